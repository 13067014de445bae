package stability

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// exact is for lengths that are products of a published factor and a length:
// only rounding parts them.
const exact = 1e-12

func ptr(x float64) *float64 { return &x }

func ended(bottom, top design.Condition, restraints ...float64) *design.Column {
	h := design.Hold{Bottom: design.End{Condition: bottom}, Top: design.End{Condition: top}, Restraints: restraints}
	return &design.Column{Length: 6000, Y: h, Z: h}
}

func lengthsOf(t *testing.T, col *design.Column, method design.Method) []float64 {
	t.Helper()
	l, err := Of(col, AxisZ, method)
	require.NoError(t, err)
	var out []float64
	for _, s := range l.Segments(nil, nil, 0) {
		out = append(out, s.Lcr)
	}
	return out
}

// BS 5950-1:2000 Table 22, from memory: every case of it, and the rule for end
// segments (common practice, no source).
func TestSegmentFactors(t *testing.T) {
	const (
		pinned, partly, fixed         = design.Pinned, design.PartlyFixed, design.Fixed
		guided, partlyGuided, unbound = design.Guided, design.PartlyGuided, design.Free
	)
	for _, c := range []struct {
		name string
		col  *design.Column
		want []float64
	}{
		{"both fixed", ended(fixed, fixed), []float64{0.7 * 6000}},
		{"both partly", ended(partly, partly), []float64{0.85 * 6000}},
		{"fixed, pinned", ended(fixed, pinned), []float64{0.85 * 6000}},
		{"pinned, fixed", ended(pinned, fixed), []float64{0.85 * 6000}},
		{"fixed, partly", ended(fixed, partly), []float64{0.85 * 6000}},
		{"partly, pinned", ended(partly, pinned), []float64{6000}},
		{"both pinned", ended(pinned, pinned), []float64{6000}},
		{"fixed, guided", ended(fixed, guided), []float64{1.2 * 6000}},
		{"fixed, partly guided", ended(fixed, partlyGuided), []float64{1.5 * 6000}},
		{"fixed, free", ended(fixed, unbound), []float64{2 * 6000}},
		{"free, fixed", ended(unbound, fixed), []float64{2 * 6000}},
		{"pinned with two restraints", ended(pinned, pinned, 1000, 3500), []float64{1000, 2500, 2500}},
		{"fixed base with two restraints", ended(fixed, pinned, 1000, 3500), []float64{850, 2500, 2500}},
		{"fixed both, one restraint", ended(fixed, fixed, 2000), []float64{0.85 * 2000, 0.85 * 4000}},
		{"partly fixed with a restraint", ended(partly, partly, 3000), []float64{3000, 3000}},
	} {
		t.Run(c.name, func(t *testing.T) {
			assert.InDeltaSlice(t, c.want, lengthsOf(t, c.col, design.MethodSegment), 6000*exact)
		})
	}
}

func TestPrecedence(t *testing.T) {
	for _, method := range []design.Method{design.MethodSegment, design.MethodElastic} {
		col := ended(design.Fixed, design.Fixed, 2000, 4000)
		col.Z.K, col.Z.Lcr = 0.9, 3100

		l, err := Of(col, AxisZ, method)
		require.NoError(t, err)
		s := l.Segments(nil, nil, 0)
		require.Len(t, s, 1)
		assert.Equal(t, 3100.0, s[0].Lcr)
		assert.Equal(t, "given", s[0].How())
		assert.Equal(t, 6000.0, s[0].Length())
		assert.Equal(t, "L_cr,z is given: the z-z restraints at 2, 4 m do not count", l.Note())

		col.Z.Lcr = 0
		require.NoError(t, l.Find(col, AxisZ, method))
		s = l.Segments(s[:0], nil, 0)
		assert.InDelta(t, 5400, s[0].Lcr, 6000*exact)
		assert.Equal(t, "given k 0.9 x L", s[0].How())
		assert.Equal(t, "k_z is given: the z-z restraints at 2, 4 m do not count", l.Note())
		assert.False(t, l.VariesWithForce() || l.VariesWithEI())

		col.Z.K = 0
		require.NoError(t, l.Find(col, AxisZ, method))
		assert.Len(t, l.Segments(nil, nil, 0), 3)
		assert.Empty(t, l.Note())
	}
}

func TestHow(t *testing.T) {
	for _, c := range []struct {
		col    *design.Column
		method design.Method
		want   []string
	}{
		{ended(design.Fixed, design.Pinned, 2000), design.MethodSegment,
			[]string{"fixed-pinned segment, 0.85 L", "pinned-pinned segment, 1.0 L"}},
		{ended(design.Fixed, design.PartlyGuided), design.MethodElastic, []string{"fixed-partly guided segment, 1.5 L"}},
		{ended(design.Pinned, design.Pinned, 3000), design.MethodElastic,
			[]string{"elastic stability of the whole member, 1.000 x the segment", "elastic stability of the whole member, 1.000 x the segment"}},
	} {
		l, err := Of(c.col, AxisZ, c.method)
		require.NoError(t, err)
		var got []string
		for _, s := range l.Segments(nil, nil, 0) {
			got = append(got, s.How())
		}
		assert.Equal(t, c.want, got)
	}
}

// What cannot be designed as it stands is refused, and the message says what
// to do.
func TestRefusals(t *testing.T) {
	const (
		pinned, partly, fixed = design.Pinned, design.PartlyFixed, design.Fixed
		guided, unbound       = design.Guided, design.Free
	)
	bad := func(change func(*design.Column)) *design.Column {
		col := ended(pinned, pinned, 2000)
		change(col)
		return col
	}
	for _, c := range []struct {
		name             string
		col              *design.Column
		segment, elastic string // part of the message; empty: no error
	}{
		{"pinned, free", ended(pinned, unbound), "pinned-free column is a mechanism", "pinned-free column is a mechanism"},
		{"free, pinned", ended(unbound, pinned), "mechanism", "mechanism"},
		{"free, free", ended(unbound, unbound), "mechanism", "mechanism"},
		{"guided, free", ended(guided, unbound), "mechanism", "mechanism"},
		{"pinned, guided", ended(pinned, guided), "Table 22 has no factor", "Table 22 has no factor"},
		{"partly, guided", ended(partly, guided), "Table 22 has no factor", "Table 22 has no factor"},
		{"partly, free", ended(partly, unbound), "Table 22 has no factor", ""},
		{"overhang", ended(pinned, unbound, 4000), "use the effective length method 'elastic'", ""},
		{"overhang at both ends of one restraint", ended(unbound, unbound, 3000), "sways", "mechanism"},
		{"overhang at both ends of two restraints", ended(unbound, unbound, 2000, 4000), "sways", ""},
		{"guided beyond a restraint", ended(fixed, guided, 4000), "guided end with restraints", "guided end with restraints"},
		{"no length", bad(func(c *design.Column) { c.Length = 0 }), "length is not", "length is not"},
		{"restraint at the top", bad(func(c *design.Column) { c.Z.Restraints = []float64{6000} }), "restraint", "restraint"},
		{"restraints out of order", bad(func(c *design.Column) { c.Z.Restraints = []float64{3000, 2000} }), "restraint", "restraint"},
		{"a restraint twice", bad(func(c *design.Column) { c.Z.Restraints = []float64{3000, 3000} }), "restraint", "restraint"},
		{"negative L_cr", bad(func(c *design.Column) { c.Z.Lcr = -1 }), "buckling length", "buckling length"},
		{"negative k", bad(func(c *design.Column) { c.Z.K = -1 }), "factor", "factor"},
		{"a restraint every 50 mm", bad(func(c *design.Column) {
			c.Z.Restraints = nil
			for x := 50.0; x < c.Length; x += 50 {
				c.Z.Restraints = append(c.Z.Restraints, x)
			}
		}), "", "more than 100 restraints"},
		{"eta above 1", bad(func(c *design.Column) { c.Z.Top.Eta = ptr(1.1) }), "distribution factor", "distribution factor"},
		{"negative stiffness", bad(func(c *design.Column) { c.Z.Bottom.Stiffness = ptr(-1) }), "rotational stiffness", "rotational stiffness"},
	} {
		for method, want := range []string{c.segment, c.elastic} {
			t.Run(c.name, func(t *testing.T) {
				_, err := Of(c.col, AxisZ, design.Method(method))
				if want == "" {
					assert.NoError(t, err)
					return
				}
				var e *Error
				require.ErrorAs(t, err, &e)
				assert.Equal(t, AxisZ, e.Axis)
				assert.ErrorContains(t, err, want)
				assert.NotEmpty(t, e.Do)
			})
		}
	}
}

// A given length makes a mechanism designable: the engineer has answered for
// it.
func TestGivenLengthCoversAMechanism(t *testing.T) {
	col := ended(design.Pinned, design.Free)
	col.Z.K = 2.5
	assert.InDeltaSlice(t, []float64{15000}, lengthsOf(t, col, design.MethodSegment), 15000*exact)
}

func TestSways(t *testing.T) {
	sways := func(change func(*design.Hold)) bool {
		col := ended(design.Fixed, design.Pinned)
		change(&col.Z)
		return Sways(col, AxisZ)
	}
	assert.False(t, sways(func(*design.Hold) {}))
	assert.True(t, sways(func(h *design.Hold) { h.Top.Condition = design.PartlyGuided }))
	assert.True(t, sways(func(h *design.Hold) { h.K = 1.01 }))
	assert.False(t, sways(func(h *design.Hold) { h.K = 1 }))
	assert.True(t, sways(func(h *design.Hold) { h.Lcr = 6001 }))
	assert.False(t, sways(func(h *design.Hold) { h.Lcr = 6000 }))
	assert.False(t, Sways(&design.Column{Length: 1, Z: design.Hold{K: 2}}, AxisY))
}

func TestMaxNEd(t *testing.T) {
	c := &design.Combination{NEd: 300, Steps: []design.Step{{Height: 2000, NEd: 500}, {Height: 4000, NEd: -100}}}
	assert.Equal(t, 300.0, MaxNEd(c, 0, 2000))
	assert.Equal(t, 500.0, MaxNEd(c, 0, 2001))
	assert.Equal(t, 500.0, MaxNEd(c, 2000, 6000))
	assert.Equal(t, -100.0, MaxNEd(c, 4000, 6000))
	assert.Equal(t, -100.0, MaxNEd(c, 5000, 6000))
}
