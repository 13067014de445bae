package revision

import (
	"fmt"

	"stanchion/design"
	"stanchion/schedule"
)

// finish writes down what became of each column.
func (k *keeper) finish(results []design.Result) {
	for i := range results {
		r := &k.kept[i]
		r.Result = results[i]
		h := k.had[i]
		r.Stays = h.Section != nil && results[i].Status != design.NotRead && results[i].Section == h.Section.Name() && (h.Grade == "" || results[i].Grade == h.Grade)
		if k.stay[i].Section != nil && k.cols[i].Given == "" {
			r.Result.Fixed = false
			r.Result.Notes = append([]string{k.remark(i)}, r.Result.Notes...)
		}
		if r.Stays {
			r.Why = ""
		} else if r.Why == "" {
			r.Why = k.why(i)
		}
	}
}

func (k *keeper) remark(i int) string {
	if k.had[i] == k.stay[i] {
		return "kept from the old issue"
	}
	return "as the others that share its section"
}

// why says why a column does not keep what it had.
func (k *keeper) why(i int) string {
	old := k.kept[i].Old
	switch {
	case k.had[i].Section == nil:
		return "the old issue has no section for it"
	case k.cols[i].Given != "":
		return "the schedule gives another"
	case old == nil || old.Status == design.NotRead:
		return "it cannot be designed"
	case old.Status == design.Passes:
		return "it passes, others joined to it do not"
	}
	return Failure(old)
}

// Failure says what a section fails in.
func Failure(r *design.Result) string {
	g := &r.Governing
	if g.Kind == design.Refused {
		return "not covered: " + g.Reason
	}
	return fmt.Sprintf("fails in %s, %.3f", schedule.CheckName(g.Kind), r.Utilisation)
}
