package ec3_test

import (
	"math"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// anyBendableCandidate draws one of the catalogue's sections on which moments
// are taken.
func anyBendableCandidate(t *rapid.T, sections []*catalogue.Section, set *design.Settings) *ec3.Candidate {
	s := rapid.SampledFrom(sections).Draw(t, "section")
	c, err := ec3.NewCandidate(s, grade(t, rapid.SampledFrom([]string{"S235", "S275", "S355", "S460"}).Draw(t, "grade")), set)
	if err != nil {
		t.Skip("refused")
	}
	return c
}

// changed returns a copy of a column with every combination passed through f.
func changed(col *design.Column, f func(*design.Combination)) *design.Column {
	out := *col
	out.Combinations = slices.Clone(col.Combinations)
	for i := range out.Combinations {
		out.Combinations[i].Steps = slices.Clone(out.Combinations[i].Steps)
		f(&out.Combinations[i])
	}
	return &out
}

func scaled(m design.EndMoments, by float64) design.EndMoments {
	return design.EndMoments{Bottom: m.Bottom * by, Top: m.Top * by}
}

// Without moments the answer is that of axial force alone, to the last figure
// and check; and moments add checks to those and take none away.
func TestWithoutMomentsTheAnswerIsAxial(t *testing.T) {
	sections := bendable(t)
	rapid.Check(t, func(t *rapid.T) {
		set := anyBendingSettings(t)
		c := anyBendableCandidate(t, sections, set)
		col := anyBentColumn(t, c.Section, c.Fy)
		straight := changed(col, func(k *design.Combination) { k.My, k.Mz = design.EndMoments{}, design.EndMoments{} })
		axial := assess(t, straight, c, set)
		require.True(t, axial.Member.AxialOnly)
		for _, check := range axial.Checks {
			assert.NotContains(t, []design.Kind{design.BendingY, design.ShearZ, design.CrossSection, design.LateralTorsional,
				design.Interaction661, design.Interaction662}, check.Kind)
		}
		bent := assess(t, col, c, set)
		var rest []design.Check
		for _, check := range bent.Checks {
			switch check.Kind {
			case design.ShearZ, design.ShearY, design.CrossSection, design.LateralTorsional, design.Interaction661, design.Interaction662:
			default:
				rest = append(rest, check)
			}
		}
		assert.Equal(t, axial.Checks, rest)
		assert.Equal(t, axial.Y, bent.Y)
		assert.Equal(t, axial.Z, bent.Z)

		// A moment that is next to nothing changes next to nothing. (Beyond the
		// critical load Annex A has no bounds.)
		if axial.Utilisation > 1 {
			return
		}
		faint := changed(col, func(k *design.Combination) { k.My, k.Mz = scaled(k.My, 1e-12), scaled(k.Mz, 1e-12) })
		assert.InDelta(t, axial.Utilisation, assess(t, faint, c, set).Utilisation, 1e-9*(1+axial.Utilisation))
	})
}

// Signs and sides do not matter: moments about either axis with the other
// sign, and the column standing on its head.
func TestMirroredActionsAreTheSame(t *testing.T) {
	sections := bendable(t)
	rapid.Check(t, func(t *rapid.T) {
		set := anyBendingSettings(t)
		set.SelfWeight = 0
		c := anyBendableCandidate(t, sections, set)
		col := anyBentColumn(t, c.Section, c.Fy)
		want := assess(t, col, c, set).Utilisation
		for _, signs := range [][2]float64{{-1, 1}, {1, -1}, {-1, -1}} {
			turned := changed(col, func(k *design.Combination) { k.My, k.Mz = scaled(k.My, signs[0]), scaled(k.Mz, signs[1]) })
			assert.InDelta(t, want, assess(t, turned, c, set).Utilisation, 1e-9*(1+want), "signs %v", signs)
		}
		assert.InDelta(t, want, assess(t, onItsHead(col), c, set).Utilisation, 1e-9*(1+want), "on its head")
	})
}

// onItsHead turns a column upside down.
func onItsHead(col *design.Column) *design.Column {
	L := col.Length
	flip := func(heights []float64) []float64 {
		var out []float64
		for _, x := range slices.Backward(heights) {
			out = append(out, L-x)
		}
		return out
	}
	out := changed(col, func(k *design.Combination) {
		k.My = design.EndMoments{Bottom: k.My.Top, Top: k.My.Bottom}
		k.Mz = design.EndMoments{Bottom: k.Mz.Top, Top: k.Mz.Bottom}
		steps := k.Steps
		k.Steps = nil
		n := k.NEd
		for _, s := range steps {
			k.Steps = append(k.Steps, design.Step{Height: L - s.Height, NEd: n})
			n = s.NEd
		}
		k.NEd = n
		slices.Reverse(k.Steps)
	})
	for _, h := range []*design.Hold{&out.Y, &out.Z} {
		h.Bottom, h.Top = h.Top, h.Bottom
		h.Restraints = flip(h.Restraints)
	}
	out.Torsion.Restraints = flip(out.Torsion.Restraints)
	return out
}

// worstOf returns the greatest utilisation of the checks of some kinds.
func worstOf(a *ec3.Assessment, kinds ...design.Kind) float64 {
	u := 0.0
	for _, check := range a.Checks {
		if slices.Contains(kinds, check.Kind) {
			u = math.Max(u, check.Utilisation)
		}
	}
	return u
}

// More of any action is never less utilisation, of a column that passes: all
// moments about an axis grow together (one end alone may bend the column into
// a kinder shape), or the compression grows.
//
// Compression has exceptions, and they are the standard's own. The exponents of
// (6.41) grow with n, so that its sum about both axes can fall; the test leaves
// that sum out for n. And the factors of Annex B for stocky members, and those
// of Annex A, can fall by more than n rises where moments make up most of the
// sum: room is given for what was found.
func TestInteractionNeverFallsAsActionsGrow(t *testing.T) {
	sections := bendable(t)
	rapid.Check(t, func(t *rapid.T) {
		set := anyBendingSettings(t)
		set.SelfWeight = 0
		room := 0.001
		if set.Interaction == design.AnnexA {
			room = 0.08
		}
		c := anyBendableCandidate(t, sections, set)
		col := anyBentColumn(t, c.Section, c.Fy)
		size := rapid.Float64Range(0, 1).Draw(t, "size")
		before := assess(t, changed(col, func(k *design.Combination) {
			k.NEd, k.My, k.Mz = k.NEd*size, scaled(k.My, size), scaled(k.Mz, size)
			for i := range k.Steps {
				k.Steps[i].NEd *= size
			}
		}), c, set)
		if before.Utilisation > 1 {
			return
		}
		by := rapid.Float64Range(1, 2).Draw(t, "by")
		grown := func(n, y, z float64) *ec3.Assessment {
			return assess(t, changed(before.Member.Column, func(k *design.Combination) {
				k.NEd, k.My, k.Mz = k.NEd*n, scaled(k.My, y), scaled(k.Mz, z)
				for i := range k.Steps {
					k.Steps[i].NEd *= n
				}
			}), c, set)
		}
		assert.LessOrEqual(t, before.Utilisation, grown(1, by, 1).Utilisation*(1+rounding), "M_y")
		assert.LessOrEqual(t, before.Utilisation, grown(1, 1, by).Utilisation*(1+rounding), "M_z")
		assert.LessOrEqual(t, before.Utilisation, grown(by, by, by).Utilisation*(1+rounding), "all")

		more := grown(by, 1, 1)
		kinds := []design.Kind{design.Compression, design.FlexuralY, design.FlexuralZ, design.Torsional, design.Interaction661, design.Interaction662}
		assert.LessOrEqual(t, worstOf(before, kinds...), worstOf(more, kinds...)*(1+room), "N_Ed")
	})
}
