package stability

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/design"
)

// slack is for the width of the enclosure of the critical load.
const slack = 1 + 1e-7

func drawEnd(t *rapid.T, label string, conditions ...design.Condition) design.End {
	e := design.End{Condition: rapid.SampledFrom(conditions).Draw(t, label)}
	if rapid.IntRange(0, 2).Draw(t, label+" numbered") == 0 {
		e.Eta = ptr(rapid.Float64Range(0, 1).Draw(t, label+" eta"))
	}
	return e
}

// drawColumn draws a column that the elastic method can take.
func drawColumn(t *rapid.T) *design.Column {
	col := &design.Column{Length: rapid.Float64Range(2000, 20000).Draw(t, "length")}
	col.Z.Bottom = drawEnd(t, "bottom", design.Fixed, design.PartlyFixed, design.Pinned)
	col.Z.Top = drawEnd(t, "top", design.Pinned, design.PartlyFixed, design.Fixed, design.Free)
	for _, f := range heights(t, "restraints", 4) {
		col.Z.Restraints = append(col.Z.Restraints, f*col.Length)
	}
	if _, err := Of(col, AxisZ, design.MethodElastic); err != nil {
		t.Skip("a mechanism")
	}
	return col
}

func ncrOf(t require.TestingT, col *design.Column, method design.Method) float64 {
	l, err := Of(col, AxisZ, method)
	require.NoError(t, err)
	least := 0.0
	for i, s := range l.Segments(nil, nil, 0) {
		if ncr := s.NcrOverEI(); i == 0 || ncr < least {
			least = ncr
		}
	}
	return least
}

func TestRestraintNeverLowers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		before := ncrOf(t, col, design.MethodElastic)
		col.Z.Restraints = withAnother(t, col)
		require.GreaterOrEqual(t, ncrOf(t, col, design.MethodElastic)*slack, before)
	})
}

// Under method segment this holds for ends that are pinned. (A fixed end's own
// segment counts 0.85 once a restraint makes a pin of its other end, so a
// single length fixed at both ends, 0.7, can lose by a restraint near an end.)
func TestRestraintNeverLowersBetweenPins(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		col.Z.Bottom, col.Z.Top = design.End{}, design.End{}
		before := ncrOf(t, col, design.MethodSegment)
		col.Z.Restraints = withAnother(t, col)
		require.GreaterOrEqual(t, ncrOf(t, col, design.MethodSegment)*slack, before)
	})
}

func withAnother(t *rapid.T, col *design.Column) []float64 {
	x := rapid.Float64Range(0.013, 0.987).Draw(t, "another") * col.Length
	more := append(slices.Clone(col.Z.Restraints), x)
	slices.Sort(more)
	return slices.Compact(more)
}

func TestLongerNeverStronger(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		method := rapid.SampledFrom([]design.Method{design.MethodSegment, design.MethodElastic}).Draw(t, "method")
		if _, err := Of(col, AxisZ, method); err != nil {
			t.Skip("not under this method")
		}
		before := ncrOf(t, col, method)
		longer := *col
		longer.Length *= rapid.Float64Range(1, 2).Draw(t, "factor")
		require.LessOrEqual(t, ncrOf(t, &longer, method), before*slack)
	})
}

// Continuity never hurts: uniformly loaded, with pinned segments.
func TestElasticNeverBelowSegment(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		col.Z.Bottom, col.Z.Top = design.End{}, design.End{}
		require.GreaterOrEqual(t, ncrOf(t, col, design.MethodElastic)*slack, ncrOf(t, col, design.MethodSegment))
	})
}

// A stiffer joint never weakens a column.
func TestStifferNeverWeaker(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		method := rapid.SampledFrom([]design.Method{design.MethodSegment, design.MethodElastic}).Draw(t, "method")
		low := rapid.Float64Range(0, 0.99).Draw(t, "eta")
		high := rapid.Float64Range(low, 0.99).Draw(t, "eta above")
		col.Z.Bottom.Eta = &low
		if _, err := Of(col, AxisZ, method); err != nil {
			t.Skip("not under this method")
		}
		stiff := ncrOf(t, col, method)
		col.Z.Bottom.Eta = &high
		require.GreaterOrEqual(t, stiff*slack, ncrOf(t, col, method))
	})
}

// Turned upside down, a column is the same.
func TestMirror(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col := drawColumn(t)
		mirrored := &design.Column{Length: col.Length, Z: design.Hold{Bottom: col.Z.Top, Top: col.Z.Bottom}}
		for _, x := range slices.Backward(col.Z.Restraints) {
			mirrored.Z.Restraints = append(mirrored.Z.Restraints, col.Length-x)
		}
		a, b := ncrOf(t, col, design.MethodElastic), ncrOf(t, mirrored, design.MethodElastic)
		require.InEpsilon(t, a, b, 1e-7)
	})
}

// Whatever stands in a column, Find returns an error or usable lengths.
func TestNeverUnusable(t *testing.T) {
	anything := rapid.Float64()
	rapid.Check(t, func(t *rapid.T) {
		col := &design.Column{Length: anything.Draw(t, "length")}
		col.Z = design.Hold{
			Restraints: rapid.SliceOfN(anything, 0, 3).Draw(t, "restraints"),
			Lcr:        rapid.SampledFrom([]float64{0, 0, 3000, -1}).Draw(t, "Lcr"),
			K:          rapid.SampledFrom([]float64{0, 0, 0.9, -1}).Draw(t, "K"),
			Bottom:     design.End{Condition: design.Condition(rapid.IntRange(0, 5).Draw(t, "bottom"))},
			Top:        design.End{Condition: design.Condition(rapid.IntRange(0, 5).Draw(t, "top"))},
		}
		if rapid.Bool().Draw(t, "stiff") {
			col.Z.Top.Stiffness = ptr(anything.Draw(t, "stiffness"))
		}
		c := &design.Combination{NEd: anything.Draw(t, "N"), Steps: []design.Step{
			{Height: anything.Draw(t, "step"), NEd: anything.Draw(t, "N above")}}}
		for _, method := range []design.Method{design.MethodSegment, design.MethodElastic} {
			l, err := Of(col, AxisZ, method)
			if err != nil {
				continue
			}
			for _, s := range l.Segments(nil, c, 1e12) {
				require.False(t, s.Lcr < 0 || s.Lcr != s.Lcr, "%+v", s)
			}
		}
	})
}
