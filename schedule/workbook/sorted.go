package workbook

import (
	"cmp"
	"maps"
	"slices"
)

// sortedKeys returns the keys of a map in order, so that nothing written
// depends on the order in which a map is gone through.
func sortedKeys[K cmp.Ordered, V any](m map[K]V) []K {
	return slices.Sorted(maps.Keys(m))
}
