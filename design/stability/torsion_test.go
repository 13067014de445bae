package stability

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

func TestTorsionLengths(t *testing.T) {
	change := func(col *design.Column, f func(*design.Column)) *design.Column { f(col); return col }
	pinned := func(restraints ...float64) *design.Column {
		return ended(design.Pinned, design.Pinned, restraints...)
	}
	for _, c := range []struct {
		name  string
		col   *design.Column
		want  []float64
		basis Basis
	}{
		{"ends only", pinned(), []float64{6000}, TwistHeld},
		{"follows z-z restraints at factor 1.0", ended(design.Fixed, design.Fixed, 2000), []float64{2000, 4000}, TwistHeld},
		{"explicit L_T comes first", change(pinned(3000), func(c *design.Column) {
			c.Torsion = design.Torsion{LT: 1800, Given: true, Restraints: []float64{1000}}
			c.Z.Lcr = 2500
		}), []float64{1800}, GivenLength},
		{"torsion restraints before L_cr,z", change(pinned(3000), func(c *design.Column) {
			c.Torsion = design.Torsion{Given: true, Restraints: []float64{1000, 4000}}
			c.Z.Lcr = 2500
		}), []float64{1000, 3000, 2000}, TwistHeld},
		{"twist held at the ends alone", change(pinned(2000, 4000), func(c *design.Column) {
			c.Torsion.Given = true
		}), []float64{6000}, TwistHeld},
		{"L_cr,z", change(pinned(3000), func(c *design.Column) { c.Z.Lcr = 2500; c.Z.K = 0.5 }), []float64{2500}, FollowsZ},
		{"k_z above 1", change(pinned(3000), func(c *design.Column) { c.Z.K = 1.5 }), []float64{9000}, FollowsZ},
		{"k_z below 1 is not less than L", change(pinned(3000), func(c *design.Column) { c.Z.K = 0.7 }), []float64{6000}, FollowsZ},
		{"a free end doubles its own segment", ended(design.Fixed, design.Free, 4000), []float64{4000, 4000}, TwistHeld},
		{"a free end alone", ended(design.Fixed, design.Free), []float64{12000}, TwistHeld},
		{"a free bottom", ended(design.Free, design.Fixed, 1000), []float64{2000, 5000}, TwistHeld},
		{"a guided end does not", ended(design.Fixed, design.Guided), []float64{6000}, TwistHeld},
		{"a free end beyond a torsion restraint", change(ended(design.Fixed, design.Free), func(c *design.Column) {
			c.Torsion = design.Torsion{Given: true, Restraints: []float64{5000}}
		}), []float64{5000, 2000}, TwistHeld},
	} {
		t.Run(c.name, func(t *testing.T) {
			segs, err := Torsion(nil, c.col)
			require.NoError(t, err)
			var got []float64
			for _, s := range segs {
				got = append(got, s.Lcr)
				assert.Equal(t, c.basis, s.Basis)
				assert.InEpsilon(t, s.Lcr, s.Factor*s.Length(), exact)
				assert.NotEmpty(t, s.How())
			}
			assert.InDeltaSlice(t, c.want, got, 12000*exact)
		})
	}
}

// The end conditions about y-y say nothing of twist.
func TestTorsionIgnoresTheMajorAxis(t *testing.T) {
	col := ended(design.Pinned, design.Pinned)
	col.Y.Top.Condition = design.Free
	segs, err := Torsion(nil, col)
	require.NoError(t, err)
	assert.Equal(t, 6000.0, segs[0].Lcr)
}

func TestTorsionRefusals(t *testing.T) {
	for _, change := range []func(*design.Column){
		func(c *design.Column) { c.Length = -1 },
		func(c *design.Column) { c.Torsion.LT = -1 },
		func(c *design.Column) { c.Torsion = design.Torsion{Given: true, Restraints: []float64{7000}} },
		func(c *design.Column) { c.Z.Restraints = []float64{0} },
	} {
		col := ended(design.Pinned, design.Pinned)
		change(col)
		_, err := Torsion(nil, col)
		assert.Error(t, err)
	}
}
