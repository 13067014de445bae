// Package ec3 holds the clauses of EN 1993-1-1:2005 + A1:2014 that a column has
// to satisfy, one file per subject: classification, effective sections (EN
// 1993-1-5), buckling curves, flexural, torsional and torsional-flexural
// buckling; with moments the cross-section under N, M and V, lateral-torsional
// buckling, the interaction by Annex B or Annex A, and columns in simple
// construction with nominal moments; fire; and the national sets of parameters.
//
// A column with moments passes every check that it would have to pass without
// them, with the class in pure compression, and the checks of bending besides,
// with the class under the combined stress; without moments no work is done for
// them. Where the axial force changes along the member, each length takes its
// own. Moments are straight between the ends: restraints do not bend them.
//
// The work is split in three so that a search is quick. A Candidate is what
// section and grade alone decide. A Member is what the column alone decides.
// Assess puts the two together. All three are pure: no file, no clock, no
// state kept between calls, so that a pool of workers may share Candidates and
// Members.
//
// Units: N, mm, MPa, N mm. Compression is positive.
package ec3
