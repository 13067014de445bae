// Package building decides the sections of a building's columns together: one
// section for the members of a group, stacks whose section runs through until
// a splice and never grows above one, and few different sizes over the whole
// project. It turns columns into a problem of package project, with what every
// set of columns may have from package search, and the answer into results.
package building
