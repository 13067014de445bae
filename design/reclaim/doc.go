// Package reclaim assigns steel at hand, reclaimed or in stock, to columns so
// that the least new steel is bought. A piece serves one column length; what is
// left of it is an offcut.
//
// A row of the schedule has one section: either every one of its pieces alike
// comes from steel at hand of one kind (section and grade), or none does. The
// assignment is exact: the relaxation in which rows may be served in part is a
// flow of greatest gain, found by successive augmenting paths (Ford and
// Fulkerson, Flows in Networks, 1962), whose solution is whole; where it serves
// a row in part or from several kinds, branch and bound closes the gap. Rows of
// one piece each need no branching.
package reclaim
