package main

import (
	"fmt"
	"strconv"

	"stanchion/design"
	"stanchion/schedule/summary"
)

func (r *run) saySteel() {
	list := r.tally.Steel()
	if len(list) == 0 {
		return
	}
	t := newTable("  Steel", ">lengths", ">length m", ">tonnes")
	row := func(s summary.Steel) {
		t.add("  "+s.Family, strconv.Itoa(s.Lengths), strconv.FormatFloat(s.Length, 'f', 1, 64), strconv.FormatFloat(s.Mass/1000, 'f', 2, 64))
	}
	for _, s := range list {
		row(s)
	}
	if len(list) > 1 {
		row(summary.Total(list))
	}
	r.print("")
	r.print(t.lines()...)
}

// sayAtHand says what is made of steel at hand, and what it saves.
func (r *run) sayAtHand() {
	d := r.reclaim
	if d == nil {
		return
	}
	mass := 0.0
	for i := range d.Results {
		if d.Results[i].AtHand != "" {
			mass += d.Results[i].Mass * float64(r.quantities[i])
		}
	}
	all := summary.Total(r.tally.Steel()).Mass
	r.print("")
	r.paragraph("", fmt.Sprintf("Steel at hand: %d of %s are used, %.2f t in columns; %.2f t are bought new", d.Used, plural(d.AtHand, "piece"), mass/1000, (all-mass)/1000))
	by := r.plan.Settings.Design.Rates.Objective
	name := [...]string{design.ByMass: "new steel", design.ByCost: "the cost of new steel", design.ByCarbon: "the CO2e of new steel"}[by]
	proof := "proven the most that can be saved"
	if d.Tied > 0 {
		proof += " with the sections of groups and stacks as they are"
	}
	if d.Bound > d.Saved {
		proof = fmt.Sprintf("the most that can be saved is proven to be within %.2g %% of it", 100*(d.Bound/d.Saved-1))
	}
	what := "It saves %s of %s: %s"
	if !d.Proven && d.Bound == d.Saved { // sizes are few, or lengths depend on each other
		what = "Bought new, each column by itself, that would be %s of %s: %s"
		proof = "with few sizes, or lengths that depend on each other, it is not proven the most"
	}
	if d.Used > 0 {
		r.paragraph("", fmt.Sprintf(what, saving(d.Saved, by), name, proof))
	}
	if d.Tied > 0 {
		r.paragraph("", fmt.Sprintf("%s of groups and stacks, whose sections are decided together, are sized as if bought: only pieces of the same section and grade are taken for them", plural(d.Tied, "column")))
	}
}

// saving writes kg as t, and money as it is.
func saving(x float64, by design.Objective) string {
	if by == design.ByCost {
		return fixed(x, 0)
	}
	return fixed(x/1000, 2) + " t"
}

// saySizes says what fewer sizes come to, where they are limited.
func (r *run) saySizes() {
	if len(r.curve) > 0 {
		r.print("")
		r.print(sizesLines(r.sizesTable(), "  ")...)
	}
}
