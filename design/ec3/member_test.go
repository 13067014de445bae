package ec3_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/design"
	"stanchion/design/ec3"
)

// FuzzMember: whatever numbers a row holds, the answer is an error or an
// assessment without a value that is no number, and never a panic.
func FuzzMember(f *testing.F) {
	f.Add(6000.0, 500e3, 0.0, 0.0, 3000.0, 0.0, 1.0, uint8(0), uint8(0))
	f.Add(0.3, -5.0, 1e9, 2.0, 0.1, 1e-9, 0.5, uint8(3), uint8(2))
	f.Add(math.Inf(1), math.NaN(), -1.0, 0.0, 7000.0, 5e-324, -2.0, uint8(5), uint8(5))
	set := settings()
	set.SelfWeight = 1.35
	sections := []*ec3.Candidate{
		candidate(f, he260a(), "S355", set),
		candidate(f, channel(200, 90, 7, 14, 12), "S275", set),
		candidate(f, angle(100, 75, 12), "S275", set),
	}
	f.Fuzz(func(t *testing.T, length, n, lcr, k, x, lt, step float64, bottom, top uint8) {
		col := &design.Column{Length: length,
			Y: design.Hold{Bottom: design.End{Condition: design.Condition(bottom % 6)},
				Top: design.End{Condition: design.Condition(top % 6)}, Lcr: lcr, K: k, Restraints: []float64{x}},
			Z:            design.Hold{Restraints: []float64{x}},
			Torsion:      design.Torsion{LT: lt, Eccentric: k},
			Combinations: []design.Combination{{NEd: n, Steps: []design.Step{{Height: x, NEd: step}}}},
		}
		for _, method := range []design.Method{design.MethodSegment, design.MethodElastic} {
			set := *set
			set.Method = method
			m, err := ec3.NewMember(col, &set)
			if err != nil {
				continue
			}
			for _, c := range sections {
				var a ec3.Assessment
				m.Assess(c, &a)
				assert.False(t, math.IsNaN(a.Utilisation))
				for _, check := range a.Checks {
					assert.False(t, math.IsNaN(check.Utilisation), "%+v", check)
					assert.GreaterOrEqual(t, check.Utilisation, 0.0)
				}
			}
		}
	})
}
