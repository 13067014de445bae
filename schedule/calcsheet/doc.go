// Package calcsheet prints the working of columns for the one who checks them:
// as text for a screen, as calculation sheets in PDF, and as a sheet of a
// workbook. It prints what package working has written down and works nothing
// out.
package calcsheet
