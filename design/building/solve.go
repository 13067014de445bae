package building

import (
	"context"
	"errors"

	"stanchion/design/project"
)

// solve finds the size of every node of the problem of the wanted sets; a chain
// that no choice serves has none. Where a splice may stand above any length, a
// change of grade is one, so that the choice is made graded.
func (r *run) solve(ctx context.Context, b *builder, wanted []bool, links []link) (*problem, project.Choice, error) {
	graded := r.options.Splices == WhereItPays
	p := b.build(wanted, r.spliceCost(), links, graded)
	if r.options.MostSizes == 0 {
		choice, _ := p.Cheapest()
		for c := range choice {
			if choice[c] == nil {
				r.unserved(p.nodes[c])
			}
		}
		return p, choice, nil
	}
	if err := r.servable(p); err != nil {
		return nil, nil, err
	}
	if !graded {
		choice, err := r.fewSizes(ctx, p, nil)
		return p, choice, err
	}
	sections := b.build(wanted, r.spliceCost(), links, false)
	sections.leaveOutUnserved()
	choice, err := r.fewSizes(ctx, sections, p)
	return p, choice, err
}

// fewSizes finds the choice of the fewest sizes that were asked for, and the
// curve up to it. Sizes are the sections of p; graded, if not nil, is the same
// problem with grades told apart: with the sections that p ends at it says
// what they come to, and the choice is of its sizes. Changes of grade, which p
// does not count, only add to the total, so that the bound of p holds.
func (r *run) fewSizes(ctx context.Context, p, graded *problem) (project.Choice, error) {
	limited := ctx
	if r.options.TimeLimit > 0 {
		var stop context.CancelFunc
		limited, stop = context.WithTimeout(ctx, r.options.TimeLimit)
		defer stop()
	}
	p.Workers = r.workers
	solutions, err := p.FewSizes(limited, r.options.MostSizes)
	if err != nil {
		return nil, err
	}
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	for i := range solutions {
		named := p
		if graded != nil {
			graded.regrade(p, &solutions[i])
			named = graded
		}
		r.curve = append(r.curve, trade(named, &solutions[i]))
	}
	last := &solutions[len(solutions)-1]
	if last.Choice == nil {
		return nil, &TooFewSizesError{r.options.MostSizes}
	}
	return last.Choice, nil
}

// servable leaves out chains that no choice of any number of sizes serves, so
// that they do not stand in the way of the others.
func (r *run) servable(p *problem) error {
	for _, sets := range p.leaveOutUnserved() {
		r.unserved(sets)
	}
	if len(p.Chains) == 0 {
		return errors.New("no column has a section that passes: there is no choice of few sizes")
	}
	r.any = unlimited(p)
	return nil
}

// unlimited is the trade of any number of sizes.
func unlimited(p *problem) *Trade {
	choice, total := p.Cheapest()
	t := &Trade{Total: total, Bound: total, Proven: true}
	t.Sizes = p.names(used(choice))
	t.Most = len(t.Sizes)
	return t
}

// unserved tells the columns of a chain that no choice serves: they are sized
// by themselves.
func (r *run) unserved(sets []int) {
	for _, k := range sets {
		r.say(k, "no choice of sections keeps every one in the stack within the one below: each is sized by itself")
	}
}

// trade carries a solution to what people read.
func trade(p *problem, s *project.Solution) Trade {
	return Trade{Sizes: p.names(s.Sizes), Most: s.K, Total: s.Cost, Bound: s.Bound, Proven: s.Proven}
}
