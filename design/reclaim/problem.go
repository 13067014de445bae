package reclaim

import (
	"cmp"
	"slices"
)

// Lot is pieces of one kind and length.
type Lot struct {
	Kind   int
	Length float64 // mm
	Number int
	Mass   float64 // kg, of one piece
}

// Row is pieces alike that columns need.
type Row struct {
	Pieces int
	Length float64 // mm, of one
	Kinds  []int   // that pass, each once
	Saves  float64 // what one piece would cost new: kg, cost or carbon
	Only   bool    // no new section passes: it is served before what saves
}

// Problem is what is needed and what is at hand.
type Problem struct {
	Rows []Row
	Lots []Lot
}

// Use is a number of pieces taken from a lot.
type Use struct{ Lot, Number int }

// Solution says from what each row is served.
type Solution struct {
	Kind   []int   // by row; -1: bought new
	Uses   [][]Use // by row
	Saved  float64 // of new steel
	Bound  float64 // no assignment that serves as many rows without a new section saves more
	Proven bool    // Saved is the most
}

// slack is by how much a piece may be shorter than the length: as little as
// lengths in m are written with.
const slack = 0.5 // mm

// gain is what an assignment is worth, the greater first: pieces that must be
// served, pieces that nothing new serves, what is saved, and steel at hand left
// over. Whole numbers, so that sums are exact and comparison is an order.
type gain [4]int64

const (
	forced = iota
	rescued
	saved
	left
)

func (a gain) plus(b gain) gain {
	for i := range a {
		a[i] += b[i]
	}
	return a
}

func (a gain) minus(b gain) gain {
	for i := range a {
		a[i] -= b[i]
	}
	return a
}

func (a gain) compare(b gain) int { return slices.Compare(a[:], b[:]) }

// worth compares what is rescued and saved alone.
func (a gain) worth(b gain) int { return slices.Compare(a[rescued:left], b[rescued:left]) }

// scale turns kg, cost and carbon into whole numbers: g and thousandths.
const scale = 1000

// class is the pieces of one kind and length: a node of the flow.
type class struct {
	kind   int
	length float64
	lots   []int
	number int
	mass   int64 // g
}

// classes returns the classes by kind and rising length.
func (p *Problem) classes() []class {
	order := make([]int, 0, len(p.Lots))
	for i := range p.Lots {
		if p.Lots[i].Number > 0 {
			order = append(order, i)
		}
	}
	slices.SortStableFunc(order, func(a, b int) int {
		return cmp.Or(cmp.Compare(p.Lots[a].Kind, p.Lots[b].Kind), cmp.Compare(p.Lots[a].Length, p.Lots[b].Length))
	})
	var out []class
	for _, i := range order {
		l := &p.Lots[i]
		if n := len(out); n == 0 || out[n-1].kind != l.Kind || out[n-1].length != l.Length {
			out = append(out, class{kind: l.Kind, length: l.Length, mass: int64(l.Mass*scale + 0.5)})
		}
		c := &out[len(out)-1]
		c.lots = append(c.lots, i)
		c.number += l.Number
	}
	return out
}

// entries returns, for every row, the class of each of its kinds with the
// shortest pieces that are long enough, if there is one.
func (p *Problem) entries(classes []class) [][]int {
	out := make([][]int, len(p.Rows))
	for i := range p.Rows {
		r := &p.Rows[i]
		for c := range classes {
			k := &classes[c]
			first := c == 0 || classes[c-1].kind != k.kind || classes[c-1].length < r.Length-slack
			if k.length >= r.Length-slack && first && slices.Contains(r.Kinds, k.kind) && p.roomFor(r, classes, c) {
				out[i] = append(out[i], c)
			}
		}
	}
	return out
}

// roomFor reports whether a kind has pieces enough from class c upward to serve
// a whole row.
func (p *Problem) roomFor(r *Row, classes []class, c int) bool {
	n := 0
	for kind := classes[c].kind; c < len(classes) && classes[c].kind == kind; c++ {
		n += classes[c].number
	}
	return n >= r.Pieces
}
