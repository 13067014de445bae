// Package project makes the decisions that concern many columns at once: one
// section for the members of a group, sections that run through a stack until
// a splice, and few different sizes over the whole project. Each decision is
// solved to a proven optimum, or the gap that remains is stated.
//
// The engineering is done before: a Node carries, for every size, what it costs
// there (kg, money or embodied carbon) or +Inf where the size does not pass.
package project
