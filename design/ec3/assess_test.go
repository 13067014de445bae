package ec3_test

import (
	"math"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// he260a has the printed properties of the European table (from memory).
func he260a() *catalogue.Section {
	return &catalogue.Section{Designation: "HE 260 A", Shape: catalogue.ShapeI,
		H: 250, B: 260, Tw: 7.5, Tf: 12.5, R: 24, Mass: 68.2,
		Properties: catalogue.Properties{A: 8680, Iy: 104.5e6, Iz: 36.68e6, It: 52.4e4, Iw: 516.4e9}}
}

func loaded(length float64, forces ...float64) *design.Column {
	col := &design.Column{Length: length, Quantity: 1}
	for _, n := range forces {
		col.Combinations = append(col.Combinations, design.Combination{NEd: n})
	}
	return col
}

// Access Steel SX002a-EN-EU, pinned column with intermediate restraints, from
// memory: S235, N_cr,y 1964.5 kN, chi_y 0.585, N_b,y,Rd 1193 kN, N_cr,z
// 6206 kN, chi_z 0.800. The figures that it prints are rounded by up to 0.1 %,
// chi_z, found from a rounded slenderness, by 0.14 %.
func TestPinnedColumnWithIntermediateRestraints(t *testing.T) {
	set := settings()
	c := candidate(t, he260a(), "S235", set)
	col := loaded(10500, 1000e3)
	col.Z.Restraints = []float64{3500, 7000}
	a := assess(t, col, c, set)
	a.Explain()
	assert.InEpsilon(t, 1964.5e3, a.Y.Ncr, 0.001)
	assert.InEpsilon(t, 0.585, a.Y.Chi, 0.001)
	assert.InEpsilon(t, 1193e3, a.Y.NbRd, 0.001)
	assert.InEpsilon(t, 6206e3, a.Z.Ncr, 0.001)
	assert.InEpsilon(t, 0.800, a.Z.Chi, 0.002)
	assert.Equal(t, "b", a.Y.Curve)
	assert.Equal(t, "c", a.Z.Curve)
	assert.Equal(t, 10500.0, a.Y.Lcr)
	assert.Equal(t, 3500.0, a.Z.Lcr)
	assert.Contains(t, a.Y.How, "pinned")
	assert.Equal(t, 1, a.Class)
	assert.Equal(t, design.FlexuralY, a.Governing.Kind)
	assert.Equal(t, "6.3.1.1(1)", a.Governing.Clause)
	assert.Equal(t, a.Utilisation, a.Governing.Utilisation)
	assert.Equal(t, a.Y.Utilisation(), a.Utilisation)

	// One check a segment and axis, one of the cross-section, one of twist a
	// segment, in the order of the standard.
	var kinds []design.Kind
	for _, check := range a.Checks {
		kinds = append(kinds, check.Kind)
	}
	assert.Equal(t, []design.Kind{design.Compression, design.FlexuralY,
		design.FlexuralZ, design.FlexuralZ, design.FlexuralZ,
		design.Torsional, design.Torsional, design.Torsional}, kinds)
}

// Steel Buildings in Europe, Single-Storey Part 5, p. 5-33 and 5-34: IPE 330
// in S355, class 4 web, A_eff 60.95 cm2, N_b,Rd 1720 kN over 8504 mm about y-y
// (read; 0.1 % covers the rounding of the example). EN values: fy 355.
func TestClass4ColumnOfPublishedTruss(t *testing.T) {
	set := settings()
	set.National = ec3.NationalSets()[1]
	s := rolled(330, 160, 7.5, 11.5, 18)
	s.A, s.Iy = 6260, 11770e4 // as the example prints them
	c := candidate(t, s, "S355", set)
	assert.Equal(t, 4, c.Class)
	assert.InEpsilon(t, 6095, c.AEff, 0.001)
	a := assess(t, loaded(8504, 100e3), c, set)
	assert.InEpsilon(t, 3373e3, a.Y.Ncr, 0.001)
	assert.InEpsilon(t, 0.8009, a.Y.LambdaBar, 0.001)
	assert.InEpsilon(t, 1720e3, a.Y.NbRd, 0.001)
	assert.Equal(t, s.A*355, c.NplRd, "tension has the gross section")
}

// Class limits by hand, eps = 0.8136 for 355 MPa and 1 for 235 MPa.
func TestClassesInCompression(t *testing.T) {
	hot := catalogue.HotFinished
	for _, c := range []struct {
		name  string
		s     *catalogue.Section
		grade string
		class int
	}{
		{"flange outstand 8.9 t", rolled(200, 2*(89+10)+8, 8, 10, 10), "S235", 1},
		{"flange outstand 9.5 t", rolled(200, 2*(95+10)+8, 8, 10, 10), "S235", 2},
		{"flange outstand 13.9 t", rolled(200, 2*(139+10)+8, 8, 10, 10), "S235", 3},
		{"flange outstand 14.1 t", rolled(200, 2*(141+10)+8, 8, 10, 10), "S235", 4},
		{"web 33 t", rolled(40+330, 150, 10, 10, 10), "S235", 1},
		{"web 37.9 t", rolled(40+379, 150, 10, 10, 10), "S235", 2},
		{"web 41.9 t", rolled(40+419, 150, 10, 10, 10), "S235", 3},
		{"web 42.1 t", rolled(40+421, 150, 10, 10, 10), "S235", 4},
		{"side 32 t + 3 t, S355: above 38 and 33 eps", box(35*8, 35*8, 8, hot), "S355", 3},
		{"side 30.5 t + 3 t, S355: up to 38 eps", box(33.5*8, 20*8, 8, hot), "S355", 2},
		{"short side decides nothing", box(26*8, 10*8, 8, hot), "S355", 1},
		{"tube 33 t, S355: up to 50 eps2 = 33.1", tube(33*5, 5, hot), "S355", 1},
		{"tube 46 t, S355: up to 70 eps2 = 46.3", tube(46*5, 5, hot), "S355", 2},
		{"tube 59 t, S355: up to 90 eps2 = 59.6", tube(59*5, 5, hot), "S355", 3},
		{"leg 11 t, S235: angles are class 3 at best", angle(110, 110, 10), "S235", 3},
		{"channel flange 9.9 t", channel(200, 8+10+99, 8, 10, 10), "S235", 2},
	} {
		assert.Equal(t, c.class, candidate(t, c.s, c.grade, settings()).Class, c.name)
	}
}

func TestCandidatesOutsideTheRulesAreRefused(t *testing.T) {
	hot := catalogue.HotFinished
	for _, c := range []struct {
		name   string
		s      *catalogue.Section
		grade  string
		clause string
		reason string
	}{
		{"tube beyond class 3", tube(60*5, 5, hot), "S355", "Table 5.2", "EN 1993-1-6"},
		{"class 4 channel", channel(450, 100, 9, 14, 12), "S460", "6.3.1.1(2)", "e_N"},
		{"class 4 angle by its leg", angle(155, 70, 10), "S235", "6.3.1.1(2)", "e_N"},
		{"class 4 angle by both legs", angle(120, 120, 10), "S235", "6.3.1.1(2)", "e_N"},
		{"thick flange, slender", rolled(600, 400, 50, 101, 15), "S355", "Table 6.2", "no buckling curve"},
		{"beyond the last band", rolled(600, 550, 60, 151, 15), "S355", "3.2.1", "last band"},
		{"M grade, hot finished", box(200, 200, 10, hot), "S420M", "3.2.1", "no M grade"},
		{"hollow grade, open section", rolled(200, 200, 9, 14, 10), "S355J2H", "3.2.1", "hollow"},
	} {
		_, err := ec3.NewCandidate(c.s, grade(t, c.grade), settings())
		var refusal *ec3.Refusal
		require.ErrorAs(t, err, &refusal, c.name)
		assert.Equal(t, c.clause, refusal.Clause, c.name)
		assert.Contains(t, refusal.Error(), c.reason, c.name)
	}
	// The same flange on a section as wide as deep has a curve.
	c := candidate(t, rolled(600, 550, 60, 101, 15), "S355", settings())
	assert.Equal(t, ec3.CurveD, c.CurveY)
}

// Beams land at 3 m and 6 m: each segment has its own force, and the greatest
// within a y-y segment that spans a step.
func TestForcesThatStepUpTheColumn(t *testing.T) {
	set := settings()
	set.Growth = 1.1
	c := candidate(t, he260a(), "S355", set)
	col := loaded(9000)
	col.Combinations = []design.Combination{{NEd: 900e3, Steps: []design.Step{{Height: 3000, NEd: 600e3}, {Height: 6000, NEd: -100e3}}}}
	col.Z.Restraints = []float64{3000, 6000}
	a := assess(t, col, c, set)
	var got [][3]float64
	for _, check := range a.Checks {
		if check.Kind == design.FlexuralZ || check.Kind == design.Tension {
			got = append(got, [3]float64{check.From, check.To, check.Ed})
		}
	}
	assert.InDeltaSlice(t, []float64{6000, 9000, 110e3}, got[0][:], 1e-6, "tension above 6 m")
	assert.InDeltaSlice(t, []float64{0, 3000, 990e3}, got[1][:], 1e-6)
	assert.InDeltaSlice(t, []float64{3000, 6000, 660e3}, got[2][:], 1e-6)
	assert.Len(t, got, 3, "the segment in tension does not buckle")
	assert.InDelta(t, 990e3, a.Y.NEd, 1e-6)
	assert.Contains(t, a.Member.Notes[0], "6.2.3")
}

// The force of own weight by hand: 1.35 x 68.2 kg/m x 9.81 m/s2 x height above.
func TestOwnWeight(t *testing.T) {
	set := settings()
	set.SelfWeight, set.Growth = 1.35, 1.1 // weight does not grow
	c := candidate(t, he260a(), "S355", set)
	col := loaded(6000, 500e3, -300e3)
	col.Z.Restraints = []float64{2000}
	a := assess(t, col, c, set)
	const perMetre = 1.35 * 68.2 * 9.81
	var got []float64
	for _, check := range a.Checks {
		got = append(got, check.Ed)
	}
	assert.InDeltaSlice(t, []float64{
		330e3,              // tension: at the top, where no weight helps
		550e3 + 6*perMetre, // compression
		550e3 + 6*perMetre, // y-y
		550e3 + 6*perMetre, // z-z below
		550e3 + 4*perMetre, // z-z above
		550e3 + 6*perMetre, // twist below
		550e3 + 4*perMetre, // twist above
	}, got, 1e-6)
}

// Where the end's rotational stiffness is given, L_cr follows the section
// tried.
func TestBucklingLengthFollowsTheSection(t *testing.T) {
	set := settings()
	stiffness := 5e9
	col := loaded(4000, 500e3)
	col.Y.Bottom.Stiffness = &stiffness
	m, err := ec3.NewMember(col, set)
	require.NoError(t, err)
	assert.True(t, m.VariesWithEI())
	var small, big ec3.Assessment
	m.Assess(candidate(t, rolled(160, 152, 6, 7, 8), "S355", set), &small)
	m.Assess(candidate(t, he260a(), "S355", set), &big)
	assert.Less(t, small.Y.Lcr, big.Y.Lcr, "the same base holds a slighter column better")
	assert.Less(t, big.Y.Lcr, 4000.0)
	assert.Equal(t, 4000.0, big.Z.Lcr)
	// NCCI SN008a, non-sway: eta1 = K_c/(K_c + S) with K_c = 4 EI/L, eta2 = 1.
	eta := 4 * design.E * 104.5e6 / 4000 / (4*design.E*104.5e6/4000 + stiffness)
	k := (1 + 0.145*(eta+1) - 0.265*eta) / (2 - 0.364*(eta+1) - 0.247*eta)
	assert.InEpsilon(t, k*4000, big.Y.Lcr, 1e-9)
}

// By the elastic method each combination has its own lengths: the twist of a
// channel couples with those of its own combination, and a segment that own
// weight alone presses has the length of a uniform force.
func TestElasticLengthsBelongToTheirCombination(t *testing.T) {
	set := settings()
	set.Method, set.SelfWeight = design.MethodElastic, 1
	c := candidate(t, channel(200, 90, 7, 14, 12), "S275", set)
	col := loaded(8000, 100e3)
	col.Combinations = append(col.Combinations, design.Combination{NEd: 100e3, Steps: []design.Step{{Height: 4000, NEd: 0}}})
	col.Y.Restraints = []float64{4000}
	col.Torsion.Given = true
	a := assess(t, col, c, set)
	uniform, stepped := a.SegY[0].Lcr, a.SegY[2].Lcr
	assert.InEpsilon(t, 4000, uniform, 1e-6)
	assert.Less(t, stepped, 0.95*uniform, "the unloaded length above holds the one below")
	assert.InEpsilon(t, 4000, a.SegY[3].Lcr, 1e-6, "under own weight alone")

	alone := *col
	alone.Combinations = col.Combinations[1:]
	b := assess(t, &alone, c, set)
	assert.InEpsilon(t, 4000, b.Twist.LcrY, 1e-6)
	alone.Combinations = []design.Combination{{NEd: -1}, col.Combinations[0]}
	b = assess(t, &alone, c, set)
	assert.Equal(t, 1, b.T.Combination)

	// Without own weight the upper segment has no compression and no length.
	set.SelfWeight = 0
	b = assess(t, col, c, set)
	assert.Zero(t, b.SegY[3].Lcr)
	var least []float64
	for _, check := range b.Checks {
		if check.Kind == design.TorsionalFlexural {
			least = append(least, check.Rd)
		}
	}
	require.Len(t, least, 2)
	assert.Greater(t, least[1], 1.01*least[0], "coupled with the shorter length of its own combination")
}

// An angle buckles about u-u and v-v over the longer of L_cr,y and L_cr,z of
// segments that overlap.
func TestAngleTakesTheLongerLength(t *testing.T) {
	set := settings()
	c := candidate(t, angle(100, 100, 12), "S275", set)
	col := loaded(4000, 100e3)
	col.Y.Restraints = []float64{1000}
	col.Z.Restraints = []float64{2000}
	a := assess(t, col, c, set)
	assert.Equal(t, 3000.0, a.Y.Lcr)
	assert.Equal(t, 3000.0, a.Z.Lcr)
	assert.Greater(t, a.Y.NbRd, a.Z.NbRd, "v-v is the weak axis")
	assert.InEpsilon(t, math.Pi*math.Pi*design.E*c.Section.Iv/(3000*3000), a.Z.Ncr, 1e-12)
	assert.Equal(t, design.TorsionalFlexural, a.TKind)
	assert.Equal(t, 3000.0, a.Twist.LcrY)
	assert.Less(t, a.T.Ncr, min(a.Twist.NcrY, a.Twist.NcrT))
}

// z-z held at one flange: between torsion restraints the section turns about
// that line, and the load lies between those of twist and of flexure over the
// whole length.
func TestFlangeRestraintWithoutTorsionRestraint(t *testing.T) {
	set := settings()
	c := candidate(t, he260a(), "S355", set)
	col := loaded(6000, 800e3)
	col.Z.Restraints = []float64{2000, 4000}
	central := *col
	central.Torsion.Given = true
	flange := *col
	flange.Torsion.EccentricFlange = true
	bare := assess(t, &central, c, set)
	held := assess(t, &flange, c, set)
	assert.Equal(t, design.Torsional, bare.TKind)
	assert.Equal(t, design.RestrainedAxis, held.TKind)
	assert.Equal(t, 125.0, held.Twist.E)
	assert.Equal(t, 6000.0, held.T.Lcr)
	is2 := (104.5e6+36.68e6)/8680 + 125*125
	assert.InEpsilon(t, (design.G*52.4e4+math.Pi*math.Pi*design.E*(516.4e9+36.68e6*125*125)/(6000*6000))/is2, held.T.Ncr, 1e-12)
	assert.Equal(t, 2000.0, held.Z.Lcr)

	// Without anything that holds z-z between, there is no line to turn about.
	col.Z.Restraints = nil
	col.Torsion.Eccentric = 125
	assert.Equal(t, design.Torsional, assess(t, col, c, set).TKind)

	// Nor where the line holds another length than the one that twists.
	col.Z.Restraints = []float64{3000, 4500}
	col.Torsion = design.Torsion{Given: true, Restraints: []float64{3000}, Eccentric: 125}
	var kinds []design.Kind
	for _, check := range assess(t, col, c, set).Checks {
		if check.Kind >= design.Torsional {
			kinds = append(kinds, check.Kind)
		}
	}
	assert.Equal(t, []design.Kind{design.Torsional, design.RestrainedAxis}, kinds)

	// Channels and angles are outside the formula.
	a := assess(t, &flange, candidate(t, channel(200, 90, 7, 14, 12), "S355", set), set)
	assert.Equal(t, design.Refused, a.Governing.Kind)
	assert.True(t, math.IsInf(a.Utilisation, 1))
	// Hollow sections do not twist.
	assert.False(t, assess(t, &flange, candidate(t, box(200, 200, 10, catalogue.HotFinished), "S355", set), set).HasT)
}

func TestTensionAndNoForce(t *testing.T) {
	set := settings()
	c := candidate(t, he260a(), "S355", set)
	a := assess(t, loaded(6000, -1000e3), c, set)
	assert.Equal(t, design.Tension, a.Governing.Kind)
	assert.Equal(t, "6.2.3(2)", a.Governing.Clause)
	assert.InEpsilon(t, 1000e3/(8680*355), a.Utilisation, 1e-12)
	assert.Len(t, a.Checks, 1)
	assert.Greater(t, a.Z.NbRd, 0.0, "the resistance to buckling stands all the same")

	a = assess(t, loaded(6000, 0), c, set)
	assert.Equal(t, 0.0, a.Utilisation)
	assert.Equal(t, design.Compression, a.Governing.Kind)
	assert.Equal(t, []string{"N_Ed is 0"}, a.Member.Notes)
}

func TestGoverningIsTheFirstAmongEquals(t *testing.T) {
	set := settings()
	c := candidate(t, box(200, 200, 10, catalogue.HotFinished), "S355", set)
	a := assess(t, loaded(5000, 700e3, 800e3, 800e3), c, set)
	assert.Equal(t, design.FlexuralY, a.Governing.Kind, "y-y before z-z")
	assert.Equal(t, 1, a.Governing.Combination, "the earlier combination")
}

// Segments cut at fractions of the length differ in the last digit of their
// lengths; still the lowest of them governs, and stands behind the resistance.
func TestTheLowestOfEqualSegmentsGoverns(t *testing.T) {
	set := settings()
	c := candidate(t, section(t, "533x210x82 UKB"), "S355", set)
	noisy := 0
	for parts := 3; parts <= 6; parts++ {
		for L := 4000.0; L < 9000; L += 37 {
			col := loaded(L, 100.1e3, 100.1e3)
			for i := 1; i < parts; i++ {
				col.Z.Restraints = append(col.Z.Restraints, float64(i)/float64(parts)*L)
			}
			a := assess(t, col, c, set)
			for _, check := range a.Checks {
				if check.Kind == design.FlexuralZ && check.Utilisation > a.Z.Utilisation() {
					noisy++
				}
			}
			assert.Zero(t, a.Z.From, "%d parts of %g mm", parts, L)
			if a.Governing.Kind == design.FlexuralZ {
				assert.Zero(t, a.Governing.From, "%d parts of %g mm", parts, L)
			}
		}
	}
	assert.NotZero(t, noisy, "no segment was longer by rounding: nothing was tried")
}

func TestMembersThatCannotBeDesigned(t *testing.T) {
	set := settings()
	for name, col := range map[string]*design.Column{
		"no force":     loaded(3000),
		"no length":    loaded(0, 1e3),
		"not a number": loaded(3000, math.NaN()),
		"infinite":     loaded(3000, math.Inf(1)),
		"mechanism":    {Length: 3000, Y: design.Hold{Top: design.End{Condition: design.Free}}, Combinations: []design.Combination{{NEd: 1}}},
	} {
		_, err := ec3.NewMember(col, set)
		assert.Error(t, err, name)
	}
}

func TestNotesNameWhatIsOverridden(t *testing.T) {
	col := loaded(6000, 100e3)
	col.Y.Restraints, col.Y.Lcr = []float64{3000}, 5000
	col.Torsion = design.Torsion{Given: true, Restraints: []float64{1000}, LT: 4000}
	m, err := ec3.NewMember(col, settings())
	require.NoError(t, err)
	require.Len(t, m.Notes, 2)
	assert.Contains(t, m.Notes[0], "y-y restraints at 3 m")
	assert.Contains(t, m.Notes[1], "L_T is given")
}

// A buckling length that no ends can explain does not go with the diagram of the
// whole length: the row says so, and what the restraint itself would give is
// worse.
func TestNotesWarnOfShortGivenLengths(t *testing.T) {
	col := loaded(8000, 300e3)
	col.Combinations[0].My = design.EndMoments{Bottom: 250e6, Top: -250e6}
	given, held := *col, *col
	given.Z.Lcr = 4000
	held.Z.Restraints = []float64{4000}
	c := candidate(t, section(t, "457x191x67 UKB"), "S355", settings())
	a := assess(t, &given, c, settings())
	require.Len(t, a.Notes(), 1)
	assert.Contains(t, a.Notes()[0], "L_cr,z given below 0.7 L")
	b := assess(t, &held, c, settings())
	assert.Empty(t, b.Notes())
	assert.Greater(t, b.Utilisation, 1.1*a.Utilisation)

	for name, quiet := range map[string]func(*design.Column){
		"fixed ends":     func(col *design.Column) { col.Z.Lcr = 5600 },
		"uniform moment": func(col *design.Column) { col.Combinations[0].My.Top = 250e6 },
		"no moment":      func(col *design.Column) { col.Combinations[0].My = design.EndMoments{} },
	} {
		given := given
		given.Combinations = slices.Clone(given.Combinations)
		quiet(&given)
		assert.Empty(t, assess(t, &given, c, settings()).Notes(), name)
	}
	tube := candidate(t, section(t, "CHS 323.9x10.0"), "S355H", settings())
	assert.Empty(t, assess(t, &given, tube, settings()).Notes(), "nothing of a tube rests on L_cr,z")
	given.Y.K = 0.5
	assert.Contains(t, assess(t, &given, tube, settings()).Notes()[0], "k_y given")
}
