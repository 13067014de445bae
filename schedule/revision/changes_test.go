package revision

import (
	"math"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"stanchion/design"
)

func texts(a, b design.Column) []string {
	var list []string
	for _, c := range Changes(&a, &b) {
		list = append(list, c.Kind.String()+": "+c.Text)
	}
	return list
}

func TestChanges(t *testing.T) {
	base := func() design.Column {
		return design.Column{Mark: "C1", Quantity: 1, Length: 4000, Combinations: []design.Combination{{Name: "ULS1", NEd: 1556e3}, {Name: "ULS2", NEd: 1930e3}}}
	}
	eta, k := 0.3, 5000e6
	for name, c := range map[string]struct {
		change func(*design.Column)
		want   []string
	}{
		"nothing": {func(c *design.Column) { c.Length = 4000 + 1e-7 }, nil},
		"load":    {func(c *design.Column) { c.Combinations[0].NEd = 1710e3 }, []string{"loads: N_Ed ULS1 1556 → 1710 kN (+9.9 %)"}},
		"tension": {func(c *design.Column) { c.Combinations[1].NEd = -20e3 }, []string{"loads: N_Ed ULS2 1930 → -20 kN"}},
		"combination new": {func(c *design.Column) {
			c.Combinations = append(c.Combinations, design.Combination{Name: "ULS3", NEd: 5e5})
		}, []string{"loads: combination ULS3 is new: N_Ed 500 kN"}},
		"combination gone": {func(c *design.Column) { c.Combinations = c.Combinations[1:] },
			[]string{"loads: combination ULS1 is gone: N_Ed was 1556 kN"}},
		"order of combinations": {func(c *design.Column) {
			c.Combinations[0], c.Combinations[1] = c.Combinations[1], c.Combinations[0]
			c.Combinations[0].Name = "uls2"
		}, nil},
		"moments": {func(c *design.Column) {
			c.Combinations[0].My.Top = 12e6
			c.Combinations[0].Mz.Bottom = -3.5e6
		}, []string{"loads: M_y,Ed top ULS1 0 → 12 kNm", "loads: M_z,Ed bottom ULS1 0 → -3.5 kNm"}},
		"steps": {func(c *design.Column) { c.Combinations[0].Steps = []design.Step{{Height: 2500, NEd: 9e5}} },
			[]string{"loads: N_Ed ULS1 above none → 2.5 m 900 kN"}},
		"reactions": {func(c *design.Column) { c.Combinations[0].FlangeA = 120e3 }, []string{"loads: reaction flange A ULS1 0 → 120 kN"}},
		"length":    {func(c *design.Column) { c.Length = 4250 }, []string{"length: length 4 → 4.25 m"}},
		"restraints": {func(c *design.Column) {
			c.Z.Restraints = []float64{2000}
			c.Y.Top.Condition = design.Fixed
			c.Y.Lcr, c.Z.K = 3500, 0.85
		}, []string{"restraint: ends y-y pinned-pinned → pinned-fixed", "restraint: L_cr,y none → 3.5 m",
			"restraint: restraints z-z none → 2 m", "restraint: k_z none → 0.85"}},
		"end stiffness": {func(c *design.Column) { c.Y.Bottom.Eta, c.Z.Top.Stiffness = &eta, &k },
			[]string{"restraint: ends y-y pinned-pinned → eta 0.3-pinned", "restraint: ends z-z pinned-pinned → pinned-5000 kNm/rad"}},
		"twist": {func(c *design.Column) { c.Torsion = design.Torsion{Given: true, LT: 3000, EccentricFlange: true} },
			[]string{"restraint: restraints torsion where z-z is held → ends", "restraint: L_T none → 3 m", "restraint: z-z held at the shear centre → one flange"}},
		"quantity": {func(c *design.Column) { c.Quantity = 4 }, []string{"quantity: quantity 1 → 4"}},
		"choice": {func(c *design.Column) {
			c.Choice = design.Choice{Families: []string{"HEA", "HEB"}, MaxWidth: 210, Limit: 0.9}
			c.Grades, c.Group = []string{"S460"}, "G1"
		}, []string{"choice of section: family none → HEA, HEB", "choice of section: grade none → S460", "choice of section: greatest width none → 210 mm",
			"choice of section: utilisation limit none → 0.9", "choice of section: group none → G1"}},
		"fire": {func(c *design.Column) { c.Fire = design.Fire{Period: 60, Boxed: true} }, []string{"fire: fire period none → 60 min", "fire: boxed no → yes"}},
	} {
		t.Run(name, func(t *testing.T) {
			b := base()
			c.change(&b)
			assert.Equal(t, c.want, texts(base(), b))
			assert.Equal(t, len(c.want), len(texts(b, base())))
			a := base()
			assert.Equal(t, len(c.want) == 0, same(&a, &b))
		})
	}
}

// One combination in each issue is the same one, whatever it is called.
func TestTheOnlyCombinationMayBeRenamed(t *testing.T) {
	a := design.Column{Combinations: []design.Combination{{Name: "ULS", NEd: 9e5}}}
	b := design.Column{Combinations: []design.Combination{{NEd: 9.9e5}}}
	assert.Equal(t, []string{"loads: N_Ed 900 → 990 kN (+10.0 %)"}, texts(a, b))
	assert.Equal(t, []string{"loads: loads given → none"}, texts(a, design.Column{}))
	assert.Empty(t, texts(design.Column{}, design.Column{}))
}

func TestGreatestNEd(t *testing.T) {
	c := design.Column{Combinations: []design.Combination{{NEd: 5e5}, {NEd: -8e5}, {NEd: 1e5, Steps: []design.Step{{Height: 1, NEd: 7e5}}}}}
	assert.Equal(t, -8e5, GreatestNEd(&c))
	assert.Zero(t, GreatestNEd(&design.Column{}))
}

func TestFigures(t *testing.T) {
	for x, want := range map[float64]string{1556: "1556", 0.30000000000000004: "0.3", 2.5: "2.5", 123456.789: "123457", -20: "-20", 0: "0", 1e-3: "0.001"} {
		assert.Equal(t, want, figures(x))
	}
	rapid.Check(t, func(rt *rapid.T) {
		x := float64(rapid.Int64Range(-1e12, 1e12).Draw(rt, "x")) / 1e4
		y, err := strconv.ParseFloat(figures(x), 64)
		assert.NoError(rt, err)
		assert.InDelta(rt, x, y, 5e-6*math.Abs(x)) // six figures
	})
}
