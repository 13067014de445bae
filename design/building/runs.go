package building

import "stanchion/design"

// Runs returns the columns that are one piece of steel each: the lengths of a
// stack through which a section runs without a splice, from the bottom up, and
// every other column by itself, in the order of the schedule. Where splices may
// stand wherever they pay, results say where they do: there is none between
// lengths that have one section.
func Runs(cols []design.Column, o Options, set *design.Settings, results []design.Result) [][]int {
	all, _ := stacks(cols, &o, set)
	run := make([][]int, len(cols)) // by the first column of each
	for i := range run {
		run[i] = []int{i}
	}
	for _, s := range all {
		first := s.lengths[0]
		for k := 1; k < len(s.lengths); k++ {
			below, i := s.lengths[k-1], s.lengths[k]
			if s.splice[k-1] && (o.Splices != WhereItPays || !alike(&results[below], &results[i])) {
				first = i
				continue
			}
			run[first], run[i] = append(run[first], i), nil
		}
	}
	var out [][]int
	for _, r := range run {
		if r != nil {
			out = append(out, r)
		}
	}
	return out
}

// alike reports whether two columns have one section in one grade.
func alike(a, b *design.Result) bool { return a.Section == b.Section && a.Grade == b.Grade }
