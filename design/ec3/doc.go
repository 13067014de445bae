// Package ec3 holds the clauses of EN 1993-1-1:2005 + A1:2014 that a column in
// compression has to satisfy, one file per subject: classification, effective
// area (EN 1993-1-5), buckling curves, flexural, torsional and
// torsional-flexural buckling, and the national sets of parameters.
//
// The work is split in three so that a search is quick. A Candidate is what
// section and grade alone decide. A Member is what the column alone decides.
// Assess puts the two together. All three are pure: no file, no clock, no
// state kept between calls, so that a pool of workers may share Candidates and
// Members.
//
// Units: N, mm, MPa, N mm. Compression is positive.
package ec3
