package revision

import "stanchion/design"

// decideTogether keeps, for columns that share a section, the one that most of
// them had, of those that pass for all.
func (k *keeper) decideTogether(members []int) {
	for _, i := range members {
		if k.cols[i].Given != "" {
			return // they have what the row gives
		}
	}
	var best Had
	most := 0
	for _, h := range k.choices(members) {
		n := 0
		for _, i := range members {
			if k.had[i] == h {
				n++
			}
		}
		if (n > most || n == most && best.Section != nil && h.Section.Mass < best.Section.Mass) && k.passesForAll(members, h) {
			best, most = h, n
		}
	}
	for _, i := range members {
		k.stay[i] = best
	}
}

// choices are the sections that the columns had, in their order.
func (k *keeper) choices(members []int) []Had {
	var list []Had
	seen := map[Had]bool{}
	for _, i := range members {
		if h := k.had[i]; h.Section != nil && !seen[h] {
			seen[h] = true
			list = append(list, h)
		}
	}
	return list
}

// passesForAll reports whether a section passes for every column that can be
// designed.
func (k *keeper) passesForAll(members []int, h Had) bool {
	set := k.engine.Settings()
	var cols []design.Column
	for _, i := range members {
		switch {
		case notAllowed(&k.cols[i], &h, &set) != "":
			return false
		case k.had[i] == h && k.kept[i].Old != nil:
			if s := k.kept[i].Old.Status; s != design.Passes && s != design.NotRead {
				return false
			}
		default:
			cols = append(cols, alone(&k.cols[i], &h))
		}
	}
	if len(cols) == 0 {
		return true
	}
	results, err := k.all(cols)
	if err != nil {
		return false // the sizing will say why
	}
	for i := range results {
		if s := results[i].Status; s != design.Passes && s != design.NotRead {
			return false
		}
	}
	return true
}
