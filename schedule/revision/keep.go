package revision

import (
	"context"
	"errors"
	"slices"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/search"
)

// Had is the section that a column had in the old issue; no section: none.
type Had struct {
	Section *catalogue.Section
	Grade   string
}

// Kept is what became of a column whose schedule is sized anew so that sections
// stay where they still pass.
type Kept struct {
	Result design.Result
	Stays  bool           // it has the section and grade that it had
	Old    *design.Result // the old section under the new actions; nil: there was none, or it is not allowed any more
	Why    string         // why it does not stay
}

// Keep sizes columns so that sections stay where they still pass, and the
// fewest members change: a section that the row gives goes first; then the one
// that the column had, if it passes and the row's own limits allow it; the rest
// is sized anew. A group has one section: of those that its members had it
// keeps the one that passes for all of them and that most have.
//
// Where lengths of a column line depend on each other, a new section can make a
// kept one beside it fail; that one is sized anew then too, until all that stay
// pass.
//
// The errors are those of SizeAll.
func Keep(ctx context.Context, e *search.Engine, cols []design.Column, had []Had, workers int) ([]Kept, error) {
	if len(had) != len(cols) {
		panic("revision: one old section for each column")
	}
	k := &keeper{ctx: ctx, engine: e, workers: workers, cols: cols, had: had, kept: make([]Kept, len(cols)), stay: make([]Had, len(cols))}
	if err := k.checkOld(); err != nil {
		return nil, err
	}
	k.decide()
	return k.kept, k.size()
}

type keeper struct {
	ctx     context.Context
	engine  *search.Engine
	workers int
	cols    []design.Column
	had     []Had
	kept    []Kept
	stay    []Had // what each column is to keep; no section: it is sized
	defects error // columns that the search could not bring to an end
}

// all sizes columns. A defect of single columns is kept and the rest goes on.
func (k *keeper) all(cols []design.Column) ([]design.Result, error) {
	results, err := k.engine.SizeAll(k.ctx, cols, k.workers, nil)
	if results == nil && err != nil {
		return nil, err
	}
	k.defects = errors.Join(k.defects, err)
	return results, nil
}

// checkOld checks the old sections under the new actions, each in its own row.
// Where the lengths of a column line depend on each other, all of them are
// there, and those without an old section are sized.
func (k *keeper) checkOld() error {
	at := k.mayStay()
	var cols []design.Column
	together := k.engine.Coupled()
	if together {
		cols = slices.Clone(k.cols)
	}
	for _, i := range at {
		if c := fixed(&k.cols[i], &k.had[i]); together {
			cols[i] = c
		} else {
			cols = append(cols, c)
		}
	}
	results, err := k.all(cols)
	if err != nil {
		return err
	}
	for n, i := range at {
		if together {
			n = i
		}
		k.kept[i].Old = &results[n]
	}
	return nil
}

// mayStay lists the columns whose old section the schedule still allows.
func (k *keeper) mayStay() []int {
	set := k.engine.Settings()
	var at []int
	for i := range k.cols {
		if k.had[i].Section == nil || k.cols[i].Given != "" {
			continue
		}
		if k.kept[i].Why = notAllowed(&k.cols[i], &k.had[i], &set); k.kept[i].Why == "" {
			at = append(at, i)
		}
	}
	return at
}

// fixed is a column with the section that it had, on its own.
func fixed(col *design.Column, h *Had) design.Column {
	c := *col
	c.Given, c.Group = h.Section.Name(), ""
	if h.Grade != "" {
		c.Grades = []string{h.Grade}
	}
	return c
}

// decide settles which columns keep what they had: each on its own, and the
// members of a group together.
func (k *keeper) decide() {
	groups := map[string][]int{}
	var order []string
	for i := range k.cols {
		name := k.cols[i].Group
		if name == "" {
			if k.passes(i) {
				k.stay[i] = k.had[i]
			}
			continue
		}
		if groups[name] == nil {
			order = append(order, name)
		}
		groups[name] = append(groups[name], i)
	}
	for _, name := range order {
		k.decideGroup(groups[name])
	}
}

func (k *keeper) passes(i int) bool {
	old := k.kept[i].Old
	return old != nil && old.Status == design.Passes
}

// size sizes what does not stay. What stays and does not pass beside new
// neighbours is let go, and the rest sized once more.
func (k *keeper) size() error {
	for {
		cols := slices.Clone(k.cols)
		for i := range cols {
			if k.stay[i].Section != nil {
				cols[i] = fixed(&k.cols[i], &k.stay[i])
			}
		}
		results, err := k.all(cols)
		if err != nil {
			return err
		}
		if !k.letGo(results) {
			k.finish(results)
			return k.defects
		}
	}
}

// letGo gives up the sections that do not pass any more, with those of their
// groups. It reports whether there were any.
func (k *keeper) letGo(results []design.Result) bool {
	gone := map[string]bool{}
	any := false
	for i := range results {
		if k.stay[i].Section == nil || results[i].Status == design.Passes || results[i].Status == design.NotRead {
			continue
		}
		any = true
		k.kept[i].Why = "it fails beside its new neighbours"
		k.stay[i] = Had{}
		if name := k.cols[i].Group; name != "" {
			gone[name] = true
		}
	}
	for i := range k.stay {
		if gone[k.cols[i].Group] {
			k.stay[i] = Had{}
		}
	}
	return any
}
