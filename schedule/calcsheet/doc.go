// Package calcsheet prints the working of columns for the one who checks them:
// as text for a screen, and as calculation sheets in PDF. It prints what
// package working has written down and works nothing out.
package calcsheet
