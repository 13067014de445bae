// Package design holds the nouns of column design: the column as the schedule
// gives it, the settings of a run, and the result. The packages below it do
// the work: material, stability, ec3 (the clauses of EN 1993-1-1) and search.
//
// Units throughout: N, mm, MPa, N mm. Axial force is positive in compression.
// Heights are measured in mm from the bottom of the column length. Axes are
// those of EN 1993-1-1: x along the member, y-y major, z-z minor.
package design
