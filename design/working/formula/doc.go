// Package formula holds the formulas of a printed working. A formula is
// written once, in a notation close to the page ("π^2 E I_y/L_cr,y^2"); from
// it come the line with symbols, the line with the numbers put in, the typeset
// form, and the value that someone with a pocket calculator gets from the
// printed numbers.
package formula
