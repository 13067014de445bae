package revision

import (
	"context"
	"errors"
	"slices"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
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

// Keeping is a schedule sized anew with the sections that stay.
type Keeping struct {
	Columns  []Kept
	Decision *building.Decision // the sizing that it ended with
}

// Keep sizes columns so that sections stay where they still pass, and the
// fewest members change: a section that the row gives goes first; then the one
// that the column had, if it passes and the row's own limits allow it; the rest
// is sized anew. Columns that share a section (groups, the lengths of a stack
// between splices) keep, of those that they had, the one that passes for all of
// them and that most have.
//
// What is sized anew can make a kept section beside it fail, where the lengths
// of a column line depend on each other; that one is sized anew then too, until
// all that stay pass. The rule that no section of a stack grows above a splice
// holds for what is sized anew, as far as the sections that stay allow it.
//
// The errors are those of building.Size; besides a *search.BugError there is a
// result.
func Keep(ctx context.Context, e *search.Engine, cols []design.Column, had []Had, o building.Options, workers int) (*Keeping, error) {
	if len(had) != len(cols) {
		panic("revision: one old section for each column")
	}
	k := &keeper{ctx: ctx, engine: e, options: o, workers: workers, cols: cols, had: had, kept: make([]Kept, len(cols)), stay: make([]Had, len(cols))}
	if err := k.checkOld(); err != nil {
		return nil, err
	}
	set := e.Settings()
	k.sets = building.Sets(cols, o, &set)
	k.decide()
	d, err := k.size()
	if d == nil {
		return nil, err
	}
	return &Keeping{k.kept, d}, k.defects
}

type keeper struct {
	ctx     context.Context
	engine  *search.Engine
	options building.Options
	workers int
	cols    []design.Column
	had     []Had
	sets    []search.Set // columns that share a section
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
		if c := alone(&k.cols[i], &k.had[i]); together {
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

// given is a column with a section that it had.
func given(col *design.Column, h *Had) design.Column {
	c := *col
	c.Given = h.Section.Name()
	if h.Grade != "" {
		c.Grades = []string{h.Grade}
	}
	return c
}

// alone is given for a column that shares its section with no other.
func alone(col *design.Column, h *Had) design.Column {
	c := given(col, h)
	c.Group = ""
	return c
}

// decide settles which columns keep what they had: each on its own, and those
// that share a section together.
func (k *keeper) decide() {
	for _, set := range k.sets {
		if len(set.Columns) > 1 {
			k.decideTogether(set.Columns)
		} else if i := set.Columns[0]; k.passes(i) {
			k.stay[i] = k.had[i]
		}
	}
}

func (k *keeper) passes(i int) bool {
	old := k.kept[i].Old
	return old != nil && old.Status == design.Passes
}

// size sizes what does not stay. What stays and does not pass beside new
// neighbours is let go, and the rest sized once more.
func (k *keeper) size() (*building.Decision, error) {
	for {
		cols := slices.Clone(k.cols)
		for i := range cols {
			if k.stay[i].Section != nil {
				cols[i] = given(&k.cols[i], &k.stay[i])
			}
		}
		d, err := building.Size(k.ctx, k.engine, cols, k.options, k.workers, nil)
		if d == nil || d.Results == nil {
			return nil, err
		}
		k.defects = errors.Join(k.defects, err)
		if !k.letGo(d.Results) {
			k.finish(d.Results)
			return d, nil
		}
	}
}

// letGo gives up the sections that do not pass any more, with those that share
// them. It reports whether there were any.
func (k *keeper) letGo(results []design.Result) bool {
	any := false
	for _, set := range k.sets {
		if !slices.ContainsFunc(set.Columns, func(i int) bool {
			return k.stay[i].Section != nil && (results[i].Status == design.Fails || results[i].Status == design.NoSection)
		}) {
			continue
		}
		any = true
		for _, i := range set.Columns {
			k.kept[i].Why = "it fails beside its new neighbours"
			k.stay[i] = Had{}
		}
	}
	return any
}
