// Package search finds the lightest rolled section that carries each column,
// proves sections that are given, and says by how much the load could grow.
//
// Candidates stand in one total order: mass per metre, then depth, then width,
// then designation (the objective of the settings may put cost or carbon in
// the place of mass), and of one section the weaker grade first. The answer
// for a column is the first candidate that passes every check, so it is the
// lightest and ties cannot move it.
//
// What depends on section and grade alone is worked out once per list of
// candidates and shared by every column that may choose from it. Columns are
// spread over a pool of workers; results land by index, so they do not depend
// on the number of workers or on who finished first.
//
// Under settings that make the lengths of a column line depend on each other's
// sections (Coupled), a line is settled as a whole: see settling in
// stack_settle.go for the steps, and why they end.
package search
