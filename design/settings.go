package design

// StrengthSource says which table gives the yield strength.
type StrengthSource uint8

// The sources of yield strength.
const (
	ProductStandard StrengthSource = iota // the product standard's bands (UK NA to EN 1993-1-1)
	Table31                               // EN 1993-1-1:2005 Table 3.1
)

// LTBCurves says which lateral-torsional buckling curves apply to rolled sections.
type LTBCurves uint8

// The sets of lateral-torsional buckling curves.
const (
	LTBCurvesEN LTBCurves = iota // EN 1993-1-1:2005 Table 6.5
	LTBCurvesUK                  // UK NA to EN 1993-1-1:2005, NA.2.17
)

// National is a set of nationally determined parameters.
type National struct {
	Name     string
	GammaM0  float64
	GammaM1  float64
	GammaMfi float64
	Strength StrengthSource
	LTB      LTBCurves
	KcFromC1 bool   // kc = 1/sqrt(C1) (UK NA) instead of Table 6.6
	Source   string // where the values come from, for people

	// Sources says where single values come from, by the name of the
	// parameter; a value without one comes from Source.
	Sources map[string]string
}

// Method is the way effective lengths are found.
type Method uint8

// The methods of effective length.
const (
	MethodSegment Method = iota // each segment between restraints on its own
	MethodElastic               // elastic critical load of the whole member
)

// MomentRule says where bending moments come from.
type MomentRule uint8

// The moment rules.
const (
	MomentsAnalysis MomentRule = iota // end moments as given
	MomentsSimple                     // nominal moments from beam reactions
)

// Interaction is the interaction rule of axial force and bending.
type Interaction uint8

// The interaction rules.
const (
	AnnexB            Interaction = iota // EN 1993-1-1:2005 Annex B
	AnnexA                               // EN 1993-1-1:2005 Annex A
	SimpleInteraction                    // NCCI SN048, inside its scope
)

// LTBMethod is the rule for lateral-torsional buckling.
type LTBMethod uint8

// The rules for lateral-torsional buckling.
const (
	LTBRolled  LTBMethod = iota // EN 1993-1-1:2005 6.3.2.3
	LTBGeneral                  // EN 1993-1-1:2005 6.3.2.2
)

// Settings are the decisions of a run, each with the default of DefaultSettings
// unless the schedule or the command line says otherwise.
type Settings struct {
	National        National
	Grades          []string // used where a row gives none; several leave the choice open
	Families        []string // used where a row gives none
	Limit           float64  // utilisation limit
	Method          Method
	Moments         MomentRule
	Interaction     Interaction
	LTB             LTBMethod
	SelfWeight      float64  // load factor on the column's own weight; 0: left out
	Growth          float64  // multiplies every given action
	TensionPositive bool     // the schedule's axial forces are positive in tension
	FireRatio       float64  // eta_fi; 0: no fire check
	FirePeriod      float64  // required period, minutes; 0: none
	ShadowFactor    float64  // k_sh of EN 1993-1-2 4.2.5.1; 0: by the standard's own expression
	ColdFormed      bool     // hollow sections without a stated finish are cold formed
	Stock           string   // name of the stock list in use, for people; empty: the whole catalogue
	Exclude         []string // sections that may not be chosen
	Rates           Rates
}

// Rates turn mass into cost and embodied carbon.
type Rates struct {
	CostPerTonne map[string]float64 // by family, by grade or by "family grade"; "" is every other
	CarbonPerKg  map[string]float64
	Objective    Objective
}

// Objective is what the choice of a section makes least.
type Objective uint8

// The objectives.
const (
	ByMass Objective = iota
	ByCost
	ByCarbon
)

// E, G and Rho are the material coefficients of EN 1993-1-1:2005 3.2.6 and
// EN 1991-1-1 Table A.4.
const (
	E   = 210_000.0 // MPa
	G   = 81_000.0  // MPa (nu = 0.3)
	Rho = 7850.0    // kg/m3
)

// Gravity, m/s2, turns mass into self-weight.
const Gravity = 9.81
