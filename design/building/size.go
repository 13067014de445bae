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
