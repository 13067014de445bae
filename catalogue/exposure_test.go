package catalogue

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// exposures of section_factors.csv.
var exposures = map[string]Exposure{
	"profile, 4 sides": {},
	"profile, 3 sides": {ThreeSides: true},
	"box, 4 sides":     {Boxed: true},
	"box, 3 sides":     {ThreeSides: true, Boxed: true},
}

func TestSectionFactorsAgreeWithPublishedTables(t *testing.T) {
	for _, row := range readPublished(t, "section_factors.csv") {
		s, err := Default().Find(row.Section, FindOptions{})
		require.NoError(t, err, row.ID)
		compare(t, &row, "surface", row.Surface, s.Perimeter/1e3, 0.005)
		e, known := exposures[row.Exposure]
		require.True(t, known, "%s: exposure %q", row.ID, row.Exposure)
		limit := 0.001 // besides half of the last place: b and A are rounded, too
		if strings.Contains(row.Note, "nearest 5") {
			limit = 2.5 / s.SectionFactor(e)
		}
		compare(t, &row, "A_m/V", row.AmOverV, s.SectionFactor(e), limit)
	}
}

// The three-sided factors of the European tables, from memory.
func TestSectionFactorsOnThreeSides(t *testing.T) {
	for name, want := range map[string]struct{ profile, box float64 }{
		"HE 200 A": {174, 108}, "HE 300 B": {96, 60}, "IPE 300": {188, 139},
	} {
		s, err := Default().Find(name, FindOptions{})
		require.NoError(t, err)
		assert.InDelta(t, want.profile, s.SectionFactor(Exposure{ThreeSides: true}), 0.55, name)
		assert.InDelta(t, want.box, s.SectionFactor(Exposure{ThreeSides: true, Boxed: true}), 0.55, name)
	}
}

func TestExposureFollowsTheShape(t *testing.T) {
	for _, s := range Default().Sections() {
		all, three := s.ExposedPerimeter(Exposure{}), s.ExposedPerimeter(Exposure{ThreeSides: true})
		box := s.ExposedPerimeter(Exposure{Boxed: true})
		if s.Shape == ShapeCHS {
			assert.Equal(t, [2]float64{all, all}, [2]float64{three, box}, s.Name())
			continue
		}
		assert.InDelta(t, s.B, all-three, 1e-9, s.Name())
		assert.Greater(t, three, 0.0, s.Name())
		// A box about a section with hollows is shorter than the profile;
		// only rounded corners make the profile the shorter one.
		if s.Shape == ShapeRHS || s.Shape == ShapeAngle {
			assert.Less(t, all, box, s.Name())
		} else {
			assert.Greater(t, all, box, s.Name())
		}
	}
}
