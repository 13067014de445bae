// Package working writes down how a column was designed, step by step, so that
// someone with a pocket calculator can follow it: every formula with its
// symbols, with the numbers put in, its result and its clause of EN
// 1993-1-1:2005 + A1:2014.
//
// The results come from the assessment of package ec3; nothing is designed
// here. A formula is written once and the line with numbers is made from it.
// Every result is printed to no more figures than the printed numbers before it
// give back: whoever works a line out from what stands on the page finds what
// stands behind it, but for one step of the last figure at most.
//
// A Sheet is neutral: package calcsheet of schedule prints it as text, as PDF
// and as a sheet of a workbook.
package working
