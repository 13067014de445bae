package search

import (
	"context"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
)

func sizeOne(t *testing.T, e *Engine, col design.Column) design.Result {
	t.Helper()
	res, err := e.SizeAll(context.Background(), []design.Column{col}, 1, nil)
	require.NoError(t, err)
	return res[0]
}

func checkOne(t *testing.T, e *Engine, col design.Column) design.Result {
	t.Helper()
	res, err := e.CheckAll(context.Background(), []design.Column{col}, 1, nil)
	require.NoError(t, err)
	return res[0]
}

func given(n float64, section string) design.Column {
	col := pressed(n)
	col.Given = section
	return col
}

func TestGivenSectionIsKept(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	for n, status := range map[float64]design.Status{1e5: design.Passes, 9e6: design.Fails} {
		res := sizeOne(t, e, given(n, "203x203x60 UKC"))
		assert.True(t, res.Fixed)
		assert.Equal(t, status, res.Status)
		assert.Equal(t, "203x203x60 UKC", res.Section)
		assert.InEpsilon(t, 60.0*4, res.Mass, 1e-12)
		assert.Equal(t, res.Status, checkOne(t, e, given(n, "203x203x60 UKC")).Status)
	}
}

// Two limits on one column: the column's own goes before the settings'.
func TestLimitDecides(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	col := given(0, "203x203x60 UKC")
	full := checkOne(t, e, col).ReserveN
	col.Combinations[0].NEd = 0.95 * full
	assert.Equal(t, design.Passes, checkOne(t, e, col).Status)
	col.Choice.Limit = 0.9
	res := checkOne(t, e, col)
	assert.Equal(t, design.Fails, res.Status)
	assert.InEpsilon(t, 0.9/0.95, res.Reserve, 1e-9)
}

// At the resistance itself the column passes, whatever the last digit of the
// utilisation; a millionth above it, it does not.
func TestAtTheLimit(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	full := checkOne(t, e, given(0, "203x203x60 UKC")).ReserveN
	for n, status := range map[float64]design.Status{
		full:                    design.Passes,
		math.Nextafter(full, 0): design.Passes,
		full * (1 + 1e-13):      design.Passes,
		full * (1 + 1e-6):       design.Fails,
	} {
		assert.Equal(t, status, sizeOne(t, e, given(n, "203x203x60 UKC")).Status, "%v", n/full)
		chosen := sizeOne(t, e, pressed(n))
		assert.LessOrEqual(t, chosen.Utilisation, 1+1e-9)
	}
}

func TestWeakestGradeThatPasses(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	col := given(1e6, "203x203x60 UKC")
	col.Grades = []string{"S355", "S275"}
	assert.Equal(t, "S275", sizeOne(t, e, col).Grade)
	col.Combinations[0].NEd = 1.38e6
	res := sizeOne(t, e, col)
	assert.Equal(t, "S355", res.Grade)
	assert.Equal(t, design.Passes, res.Status)
	col.Combinations[0].NEd = 9e6
	res = sizeOne(t, e, col)
	assert.Equal(t, "S355", res.Grade, "the least utilisation")
	assert.Equal(t, design.Fails, res.Status)
}

func TestGivenSectionOutsideTheRulesFails(t *testing.T) {
	set := settingsOf(t, "UK")
	e := engineOf(t, set)
	var slender *catalogue.Section // beyond class 3: EN 1993-1-6
	for _, s := range catalogue.Default().Sections() {
		if s.Shape == catalogue.ShapeCHS && s.H/s.Tf > 90*235/355.0 {
			slender = s
		}
	}
	require.NotNil(t, slender)
	col := given(1e5, slender.Name())
	col.Choice.Families = []string{"CHS"}
	res := checkOne(t, e, col)
	assert.Equal(t, design.Fails, res.Status)
	assert.Equal(t, design.Refused, res.Governing.Kind)
	assert.NotEmpty(t, res.Governing.Reason)
	assert.Contains(t, res.Notes[0], slender.Name())
	assert.True(t, math.IsInf(res.Utilisation, 1))
	assert.Zero(t, res.Reserve)
}

// A rule that does not cover the section under these actions is named too.
func TestGivenSectionOutsideTheRulesUnderItsActions(t *testing.T) {
	col := given(1e5, "200x90x30 UKPFC")
	col.Combinations[0].My.Top = 1e6
	e := engineOf(t, settingsOf(t, "UK"))
	for _, res := range []design.Result{sizeOne(t, e, col), checkOne(t, e, col)} {
		assert.Equal(t, design.Fails, res.Status)
		assert.Contains(t, res.Notes, "200x90x30 UKPFC S355: moments on channels and angles are not covered: "+
			"their shear centre is off the centroid (6.3.3)")
	}
}

func TestWhatCannotBeDesignedIsNotRead(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	mechanism := pressed(1e5)
	mechanism.Z.Top.Condition = design.Free
	family := pressed(1e5)
	family.Choice.Families = []string{"XYZ"}
	grade := pressed(1e5)
	grade.Grades = []string{"S999"}
	for name, col := range map[string]design.Column{
		"an unknown section": given(1e5, "203x203x61 UKC"),
		"a mechanism":        mechanism,
		"an unknown family":  family,
		"an unknown grade":   grade,
	} {
		res := sizeOne(t, e, col)
		assert.Equal(t, design.NotRead, res.Status, name)
		require.Len(t, res.Notes, 1, name)
		assert.NotEmpty(t, res.Notes[0], name)
		assert.Empty(t, res.Section, name)
	}
	assert.Equal(t, design.NotRead, checkOne(t, e, pressed(1e5)).Status, "no section to check")
}

// Where a rule covers no candidate at all, the note says which.
func TestNoSectionSaysWhichRuleDoesNotCover(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Families = []string{"UKPFC"}
	col := pressed(100e3)
	col.Combinations[0].My.Top = 10e6
	r := sizeOne(t, engineOf(t, set), col)
	assert.Equal(t, design.NoSection, r.Status)
	assert.Contains(t, r.Notes[len(r.Notes)-1], "outside the rules: moments on channels and angles are not covered")
}
