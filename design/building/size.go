package building

import (
	"context"
	"errors"
	"fmt"
	"maps"
	"slices"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/project"
	"stanchion/design/search"
)

// Size chooses the sections of a building's columns together. Without stacks
// that are joined and without a limit on the number of sizes it is the
// engine's SizeAll. The least total is found exactly, or, with a limit on
// sizes, the Curve says what gap may be left.
//
// Where the lengths of a stack depend on each other's sections (shared moments,
// carried weight: Engine.Coupled), the decision is made as if they did not,
// and made again without whatever fails beside its neighbours, until nothing
// does: every section then passes, but a lighter choice may exist.
//
// The errors are those of SizeAll, and those of options that cannot be met.
func Size(ctx context.Context, e *search.Engine, cols []design.Column, o Options, workers int, progress func(done int)) (*Decision, error) {
	if err := o.Validate(); err != nil {
		return nil, err
	}
	set := e.Settings()
	all, notes := stacks(cols, &o, &set)
	if len(all) == 0 && o.MostSizes == 0 {
		results, err := e.SizeAll(ctx, cols, workers, progress)
		addNotes(results, notes)
		return &Decision{Results: results}, err
	}
	r := &run{engine: e, cols: cols, options: &o, plan: tie(cols, all), workers: workers, doubts: notes}
	return r.decide(ctx, progress)
}

// run is the work of one Size.
type run struct {
	engine  *search.Engine
	cols    []design.Column
	options *Options
	plan    *plan
	workers int
	doubts  map[int]string // notes on the place of columns in their stacks
	notes   map[int]string // the same and what the decision has to say, by column
	curve   []Trade
	any     *Trade
}

func (r *run) decide(ctx context.Context, progress func(int)) (*Decision, error) {
	options, defect := r.mayHave(ctx)
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	b := &builder{engine: r.engine, cols: r.cols, plan: r.plan, options: options}
	for {
		d, chosen, err := r.attempt(ctx, b, progress)
		if d == nil {
			return nil, err
		}
		if !r.engine.Coupled() || !b.ruleOut(chosen, d.Results) {
			return d, errors.Join(defect, err)
		}
	}
}

// attempt decides with the options as they stand, and makes the results.
func (r *run) attempt(ctx context.Context, b *builder, progress func(int)) (*Decision, []search.Chosen, error) {
	r.notes, r.curve, r.any = maps.Clone(r.doubts), nil, nil
	silent := b.silent()
	links := r.sound(b, r.plan.bridge(silent))
	p, choice, err := r.solve(ctx, b, r.wanted(silent, links), links)
	if err != nil {
		return nil, nil, err
	}
	chosen := r.chosen(b, p, choice)
	results := make([]design.Result, len(r.cols))
	err = r.engine.Assign(ctx, r.cols, chosen, results, r.workers, r.columns(progress))
	if cancelled := ctx.Err(); cancelled != nil {
		return nil, nil, cancelled
	}
	addNotes(results, r.notes)
	return &Decision{Results: results, Curve: r.curve, Any: r.any}, chosen, err
}

// ruleOut takes from the options what turned out to fail beside the sections
// above and below, which options do not know, and reports whether there was
// anything. Every call that does leaves fewer options, so that deciding again
// and again ends.
func (b *builder) ruleOut(chosen []search.Chosen, results []design.Result) bool {
	found := false
	for k := range chosen {
		c := chosen[k].Candidate
		failing := func(i int) bool { return results[i].Status == design.Fails }
		if c == nil || !slices.ContainsFunc(chosen[k].Columns, failing) {
			continue
		}
		o := &b.options[k]
		o.Pass[slices.Index(o.List.Candidates, c)] = false
		found = true
	}
	return found
}

// mayHave finds what the sets that are decided together may have.
func (r *run) mayHave(ctx context.Context) ([]search.Options, error) {
	asked := r.wanted(make([]bool, len(r.plan.sets)), r.plan.links)
	var sets []search.Set
	for k, set := range r.plan.sets {
		if asked[k] {
			sets = append(sets, set)
		}
	}
	found, err := r.engine.Options(ctx, r.cols, sets, r.workers)
	options := make([]search.Options, len(r.plan.sets))
	for k := range options {
		if asked[k] && len(found) > 0 {
			options[k], found = found[0], found[1:]
		}
	}
	return options, err
}

// wanted says which sets are decided together: all that have a say where sizes
// are few, else those that stand on one another. The rest is sized by itself.
func (r *run) wanted(silent []bool, links []link) []bool {
	out := make([]bool, len(silent))
	for k := range out {
		out[k] = r.options.MostSizes > 0 && !silent[k]
	}
	for _, l := range links {
		out[l.below], out[l.above] = true, true
	}
	return out
}

func (r *run) spliceCost() float64 {
	if r.options.Splices == WhereItPays {
		return r.options.SpliceCost
	}
	return 0
}

// sound leaves out links between two given sections that the rule does not
// allow: the schedule decides, and is told.
func (r *run) sound(b *builder, links []link) []link {
	var out []link
	for _, l := range links {
		below, above := &b.options[l.below], &b.options[l.above]
		if below.Given && above.Given {
			s, t := below.List.Candidates[0].Section, above.List.Candidates[0].Section
			if s != t && !mayStand(s, t) {
				r.say(l.above, fmt.Sprintf("stack %q: %s is given above %s, which is lighter or smaller", l.stack, t.Name(), s.Name()))
				continue
			}
		}
		out = append(out, l)
	}
	return out
}

// say notes something about every column of a set.
func (r *run) say(set int, text string) {
	for _, i := range r.plan.sets[set].Columns {
		note(r.notes, i, text)
	}
}

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

// chosen lists every set with what was decided for it.
func (r *run) chosen(b *builder, p *problem, choice project.Choice) []search.Chosen {
	decided := make(map[int]*ec3.Candidate)
	for c, picks := range choice {
		for n, j := range picks {
			k := p.nodes[c][n]
			if c := p.pick[k][j]; !b.options[k].Given || otherGrade(&b.options[k], c) {
				decided[k] = c
			}
		}
	}
	out := make([]search.Chosen, len(r.plan.sets))
	for k := range out {
		out[k] = search.Chosen{Set: r.plan.sets[k]}
		if c := decided[k]; c != nil {
			l := b.options[k].List
			out[k].Candidate = c
			if !b.options[k].Given {
				out[k].Lighter, out[k].Over, out[k].Why = l.Lighter(c), l.Over(c), r.why()
			}
		}
	}
	return out
}

// why says what may keep a set from the lightest section that passes.
func (r *run) why() string {
	if n := r.options.MostSizes; n > 0 {
		return "at most " + different(n) + " may be used in all"
	}
	if r.options.Splices == WhereItPays {
		return "the stack is lighter as a whole, splices counted"
	}
	return "a section of the stack is never heavier or of a larger serial size than the one below"
}

// columns turns the count of sets into that of columns.
func (r *run) columns(progress func(int)) func(int) {
	if progress == nil {
		return nil
	}
	return func(done int) {
		if done == len(r.plan.sets) {
			progress(len(r.cols))
			return
		}
		progress(done)
	}
}

func addNotes(results []design.Result, notes map[int]string) {
	for i, text := range notes {
		if i < len(results) {
			results[i].Notes = append(results[i].Notes, text)
		}
	}
}
