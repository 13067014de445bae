package search

import (
	"context"

	"stanchion/design"
	"stanchion/design/ec3"
)

// surroundings are the sections to which the lines of a schedule settle, among
// which single sets are tried.
type surroundings struct {
	cols    []design.Column
	lines   standing
	index   map[*design.Column]int
	section []*ec3.Candidate // by column; nil: it has none
}

// surroundings settles every line, the columns in no set each on its own.
// Without a result the error is that of ctx.
func (e *Engine) surroundings(ctx context.Context, cols []design.Column, sets []Set, scratch []design.Result, workers int) (*surroundings, error) {
	a := &surroundings{cols: cols, lines: stand(cols), index: map[*design.Column]int{}, section: make([]*ec3.Candidate, len(cols))}
	inSet := make([]bool, len(cols))
	chosen := make([]Chosen, 0, len(sets))
	for _, set := range sets {
		chosen = append(chosen, Chosen{Set: set})
		for _, i := range set.Columns {
			inSet[i] = true
		}
	}
	for i := range cols {
		a.index[&cols[i]] = i
		if !inSet[i] {
			chosen = append(chosen, Chosen{Set: Set{Columns: []int{i}}})
		}
	}
	_, clusters := parts(chosen, &a.lines)
	err := e.each(ctx, workers, len(clusters), nil, func(w *worker, i int) {
		defer w.bugs.catchAll(columnsOf(clusters[i]), cols, scratch)
		for _, n := range w.settled(clusters[i], cols, &a.lines, scratch).nodes {
			for _, l := range n.lengths {
				a.section[l.index] = n.candidate()
			}
		}
	})
	if ctx.Err() != nil {
		return nil, ctx.Err()
	}
	return a, err
}

// put puts the columns of a team among the sections above and below them, and
// returns what has to be told of every candidate that is tried: it is the
// section of all of them, and its weight stands on those below.
func (a *surroundings) put(t *team) (move func(*ec3.Candidate)) {
	if a == nil {
		return func(*ec3.Candidate) {}
	}
	own := map[int]*ec3.Neighbour{}
	for _, m := range t.mates {
		own[a.index[m.col]] = &ec3.Neighbour{Column: m.col}
	}
	beside := func(i int) *ec3.Neighbour {
		switch {
		case i < 0:
			return nil
		case own[i] != nil:
			return own[i]
		case a.section[i] == nil:
			return nil
		}
		return &ec3.Neighbour{Column: &a.cols[i], Section: a.section[i].Section}
	}
	for _, m := range t.mates {
		i := a.index[m.col]
		m.member.Between(beside(a.lines.below[i]), beside(a.lines.above[i]))
		m.demand.of(&m.member, m.limit)
	}
	return func(c *ec3.Candidate) {
		for _, n := range own {
			n.Section = c.Section
		}
		for _, m := range t.mates {
			m.member.Carried = a.carried(a.index[m.col], m.member.WeightPerMass, own)
		}
	}
}

// carried returns the own weight of the lengths above a column.
func (a *surroundings) carried(i int, perMass float64, own map[int]*ec3.Neighbour) float64 {
	sum := 0.0
	for j := a.lines.above[i]; j >= 0; j = a.lines.above[j] {
		switch {
		case own[j] != nil:
			sum += perMass * own[j].Section.Mass * a.cols[j].Length
		case a.section[j] != nil:
			sum += perMass * a.section[j].Section.Mass * a.cols[j].Length
		}
	}
	return sum
}
