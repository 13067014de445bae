// Package stability finds what a column buckles over: the segments between
// its restraints, their buckling lengths about each axis and in torsion, and
// the elastic critical load of the whole member.
//
// EN 1993-1-1 gives no effective-length factors. Those of BS 5950-1:2000
// Table 22 are used for ends that are described in words, the published
// distribution-factor expressions (Access Steel NCCI SN008a; ENV 1993-1-1
// Annex E) for ends whose rotational restraint is given as a number, and an
// elastic stability analysis where the method asks for one.
//
// The order of precedence about an axis is: a given buckling length; a given
// factor on the whole length; restraints and ends. Lengths are in mm, forces
// in N (positive in compression), rotational stiffnesses in N mm/rad and EI in
// N mm2. Nothing here knows a section: what depends on one asks for its EI.
package stability
