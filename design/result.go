package design

// Status is the outcome for one column.
type Status uint8

// The outcomes.
const (
	Passes Status = iota
	Fails
	NoSection // no candidate passes; the best tried is named
	NotRead   // the row could not be read, or describes something the rules cannot take
)

// String returns the status as it stands in the output.
func (s Status) String() string {
	return [...]string{"passes", "fails", "no section", "not read"}[s]
}

// Kind names a check, in the order of the standard; the order settles which of
// equal utilisations governs.
type Kind uint8

// The checks.
const (
	KindNone            Kind = iota
	Tension                  // 6.2.3
	Compression              // 6.2.4
	BendingY                 // 6.2.5 about y-y
	BendingZ                 // 6.2.5 about z-z
	ShearZ                   // 6.2.6, shear along z-z, from moments about y-y
	ShearY                   // 6.2.6, shear along y-y, from moments about z-z
	CrossSection             // 6.2.9 (with 6.2.10)
	FlexuralY                // 6.3.1 about y-y (u-u of an angle)
	FlexuralZ                // 6.3.1 about z-z (v-v of an angle)
	Torsional                // 6.3.1.4
	TorsionalFlexural        // 6.3.1.4
	RestrainedAxis           // 6.3.1 with the critical load about a restrained axis
	LateralTorsional         // 6.3.2
	Interaction661           // 6.3.3 (6.61)
	Interaction662           // 6.3.3 (6.62)
	SimpleConstruction       // NCCI SN048
	SimpleConstructionY      // NCCI SN048, N_Ed/N_b,y,Rd on a pinned base
	Refused                  // a rule does not cover this section: Reason says which
)

// Check is one comparison that a column had to pass.
type Check struct {
	Kind        Kind
	Clause      string  // "6.3.1.1(1)"
	Combination int     // index into Column.Combinations
	From, To    float64 // the segment, mm from the bottom
	NEd         float64 // axial force that the check rests on, own weight included, N, compression positive; 0 of a refusal
	Ed, Rd      float64 // action and resistance, N or N mm; 0 where the criterion is a sum
	Utilisation float64 // +Inf of a refusal
	Reason      string  // of a refusal or a change of rule
}

// Buckling holds the values behind a buckling resistance about one axis: those
// of the segment and combination with the greatest N_Ed/N_b,Rd.
type Buckling struct {
	From, To    float64 // segment, mm
	Combination int
	Lcr         float64 // mm
	How         string  // how Lcr was found, for people
	Ncr         float64 // N
	LambdaBar   float64
	Curve       string // a0 a b c d
	Alpha       float64
	Phi         float64
	Chi         float64
	NEd         float64 // N
	NbRd        float64 // N
}

// Utilisation returns N_Ed/N_b,Rd, 0 where there is no compression.
func (b *Buckling) Utilisation() float64 {
	if b.NEd <= 0 || b.NbRd <= 0 {
		return 0
	}
	return b.NEd / b.NbRd
}

// Result is what is said about one column.
type Result struct {
	Status  Status
	Notes   []string
	Section string // Section.Name
	Grade   string
	Fixed   bool   // the section was given, not chosen
	AtHand  string // the pieces of steel at hand that it is made of, for people; empty: bought new

	Utilisation float64 // +Inf where a rule does not cover the section
	Governing   Check

	Y, Z, T  Buckling // T: torsional, torsional-flexural or about the restrained axis
	HasT     bool
	TKind    Kind
	MbRd     float64 // N mm, of the governing lateral-torsional segment; 0: none
	Class    int     // of the governing check
	Fy       float64 // MPa
	MassPerM float64 // kg/m
	Mass     float64 // kg, one piece

	// The evidence: the next lighter candidate and the check that it fails.
	NextLighter            string
	NextLighterGrade       string
	NextLighterUtilisation float64
	NextLighterCheck       Check

	Reserve      float64 // factor on every axial force at which the first check fails; 0: not asked for or none
	ReserveN     float64 // N, compression that could be added to every axial force until then; negative where the column fails
	ReserveCheck Kind    // the check that gives way first under the added compression

	Fire FireResult
}
