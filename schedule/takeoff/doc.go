// Package takeoff counts the steel of a schedule: by section and grade, by
// level, by family, and by the lengths that are to be cut, with painted area,
// splices, allowances and, where rates are given, cost and embodied carbon.
//
// Everything is counted in whole numbers, so that every table adds up to the
// same total, and that total is the sum over the members to the last unit: a
// length is a whole number of micrometres, and what one piece of a member
// weighs, shows and costs is rounded once (to the gram, the mm2, the millionth
// of the currency and the milligram of CO2e). Only whole numbers are added
// after that. The mass is the published mass per metre times the length, by
// which steel is bought.
package takeoff
