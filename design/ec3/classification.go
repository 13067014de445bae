package ec3

import (
	"math"

	"stanchion/catalogue"
)

// Element is one flat part of a section, or a tube's wall, with the limits
// that classify it in pure compression. EN 1993-1-1:2005 Table 5.2.
type Element struct {
	Name     string     // "flange outstand"
	C, T     float64    // width and thickness, mm
	Ratio    float64    // c/t; d/t of a tube; (b + h)/2t of an angle
	Limits   [3]float64 // of class 1, 2 and 3
	Class    int
	Internal bool // supported along both edges
	Count    int  // how many alike the section has
	Symbol   string
}

// Eps returns sqrt(235/fy), fy in MPa. EN 1993-1-1:2005 Table 5.2.
func Eps(fy float64) float64 { return math.Sqrt(235 / fy) }

// classified returns the element with its class.
func (e Element) classified() Element {
	e.Class = 4
	for i := 2; i >= 0; i-- {
		if e.Ratio <= e.Limits[i] {
			e.Class = i + 1
		}
	}
	return e
}

// internal returns an internal part in compression. EN 1993-1-1:2005 Table
// 5.2, sheet 1.
func internal(name string, c, t, eps float64, count int) Element {
	return Element{Name: name, Symbol: "c/t", C: c, T: t, Ratio: c / t, Internal: true, Count: count,
		Limits: [3]float64{33 * eps, 38 * eps, 42 * eps}}.classified()
}

// outstand returns an outstand part in compression. EN 1993-1-1:2005 Table
// 5.2, sheet 2.
func outstand(c, t, eps float64, count int) Element {
	return Element{Name: "flange outstand", Symbol: "c/t", C: c, T: t, Ratio: c / t, Count: count,
		Limits: [3]float64{9 * eps, 10 * eps, 14 * eps}}.classified()
}

// Elements returns the parts of a section that classify it in pure
// compression, eps being sqrt(235/fy), fy in MPa. EN 1993-1-1:2005 Table 5.2.
// The clear width of the sides of a rectangular hollow section is taken as
// h - 3t (common practice, no source).
func Elements(s *catalogue.Section, eps float64) []Element {
	switch s.Shape {
	case catalogue.ShapeI:
		return []Element{
			outstand((s.B-s.Tw-2*s.R)/2, s.Tf, eps, 4),
			internal("web", s.H-2*s.Tf-2*s.R, s.Tw, eps, 1),
		}
	case catalogue.ShapeChannel:
		return []Element{
			outstand(s.B-s.Tw-s.R, s.Tf, eps, 2),
			internal("web", s.H-2*s.Tf-2*s.R, s.Tw, eps, 1),
		}
	case catalogue.ShapeRHS:
		return []Element{
			internal("side h", s.H-3*s.Tw, s.Tw, eps, 2),
			internal("side b", s.B-3*s.Tw, s.Tw, eps, 2),
		}
	case catalogue.ShapeCHS:
		return []Element{Element{Name: "wall", Symbol: "d/t", C: s.H, T: s.Tw, Ratio: s.H / s.Tw, Count: 1,
			Limits: [3]float64{50 * eps * eps, 70 * eps * eps, 90 * eps * eps}}.classified()}
	}
	return angleElements(s, eps)
}

// angleElements returns the two criteria of an angle in compression, which
// know no class better than 3. EN 1993-1-1:2005 Table 5.2, sheet 3.
func angleElements(s *catalogue.Section, eps float64) []Element {
	long := Element{Name: "longer leg", Symbol: "h/t", C: s.H, T: s.Tw, Ratio: s.H / s.Tw, Count: 1,
		Limits: [3]float64{0, 0, 15 * eps}}
	both := Element{Name: "both legs", Symbol: "(b + h)/2t", C: (s.B + s.H) / 2, T: s.Tw, Ratio: (s.B + s.H) / (2 * s.Tw), Count: 1,
		Limits: [3]float64{0, 0, 11.5 * eps}}
	return []Element{long.classified(), both.classified()}
}

// worst returns the class of the section: the highest of its elements.
func worst(elements []Element) int {
	class := 1
	for i := range elements {
		class = max(class, elements[i].Class)
	}
	return class
}
