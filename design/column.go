package design

// Column is one column length of the schedule, or several alike.
type Column struct {
	Mark       string // shown to people; the row's cell where the schedule gives none
	Stack      string // grid reference that the lengths of one column line share
	From, To   string // levels
	Quantity   int    // pieces alike, at least 1
	Group      string // members of a group share one section
	Splice     bool   // the section may change above this length
	SpliceSaid bool   // the schedule has a splice column for this row

	Length float64 // mm

	Y, Z    Hold    // what holds the column about y-y and z-z
	Torsion Torsion // what holds it against twist

	Combinations []Combination // at least one

	Choice Choice   // which sections may be chosen
	Given  string   // section that the schedule fixes; empty where it is to be chosen
	Grades []string // grades allowed for this member; empty: the settings' own

	Fire Fire // buckling lengths in fire

	Cell  string   // sheet!cell of its first row, or line in a text schedule
	Notes []string // what the reading had to say about it
}

// Condition tells how an end of a column is held about one axis
// (BS 5950-1:2000 Table 22 names the cases).
type Condition uint8

// The end conditions. The first three are held in position; the last three
// sway: a swaying end beyond the other, held, end.
const (
	Pinned       Condition = iota // held in position only
	PartlyFixed                   // held in position, partly in direction
	Fixed                         // held in position and direction
	Guided                        // free to sway, held in direction
	PartlyGuided                  // free to sway, partly held in direction
	Free                          // free to sway and turn
)

// Sways reports whether an end with this condition is free in position.
func (c Condition) Sways() bool { return c >= Guided }

// String returns the condition as the schedule spells it.
func (c Condition) String() string {
	return [...]string{"pinned", "partly fixed", "fixed", "guided", "partly guided", "free"}[c]
}

// End is one end of a column about one axis. Eta or Stiffness, where given,
// replaces the rotational restraint that Condition stands for.
type End struct {
	Condition Condition
	Eta       *float64 // distribution factor: column stiffness over total stiffness at the joint, 0 fixed to 1 pinned
	Stiffness *float64 // rotational stiffness of what the end is joined to, N mm/rad
}

// Hold is what holds a column about one axis, and the lengths that the
// schedule gives outright.
type Hold struct {
	Bottom, Top End
	Restraints  []float64 // heights strictly between the ends, rising, mm
	Lcr         float64   // given buckling length, mm; 0: none given
	K           float64   // given effective-length factor on the whole length; 0: none given
}

// Torsion is what holds a column against twist.
type Torsion struct {
	Given           bool      // torsion restraints are given: Restraints is the list, empty for the ends alone
	Restraints      []float64 // heights strictly between the ends, rising, mm
	LT              float64   // given torsional buckling length, mm; 0: none given
	Eccentric       float64   // distance, mm along z-z from the shear centre to the line at which z-z restraints without torsion restraint hold the section; see EccentricFlange
	EccentricFlange bool      // z-z is held at the face of one flange only: the eccentricity is h/2 of the section being tried
}

// Combination is one set of factored actions.
type Combination struct {
	Name  string
	NEd   float64 // axial force in the lowest part, N
	Steps []Step  // axial force in the parts above, rising in height

	My, Mz EndMoments // from analysis, N mm

	// Beam reactions at the top of the length, N, for nominal moments: on the
	// flanges (bending about y-y) and on the two sides of the web (z-z).
	FlangeA, FlangeB, WebA, WebB float64
	HasReactions                 bool
}

// Step is the axial force above a height, N and mm.
type Step struct{ Height, NEd float64 }

// EndMoments are ordinates of the bending-moment diagram at the two ends:
// equal signs bend in single curvature (psi = +1).
type EndMoments struct{ Bottom, Top float64 }

// Zero reports whether there is no moment at either end.
func (m EndMoments) Zero() bool { return m.Bottom == 0 && m.Top == 0 }

// NEdAt returns the axial force just above height x (mm), in N.
func (c *Combination) NEdAt(x float64) float64 {
	n := c.NEd
	for _, s := range c.Steps {
		if s.Height > x {
			break
		}
		n = s.NEd
	}
	return n
}

// Choice limits which sections may be chosen. Zero values do not limit.
type Choice struct {
	Families                   []string // empty: the settings' own
	MinDepth, MaxDepth         float64  // mm
	MinWidth, MaxWidth         float64  // mm
	MinThickness, MaxThickness float64  // flange or wall, mm
	Limit                      float64  // utilisation limit; 0: the settings' own
}

// Fire holds what the fire check needs beyond the ambient data.
type Fire struct {
	LcrY, LcrZ float64 // buckling lengths in fire, mm; 0: none given
	LoadRatio  float64 // eta_fi of this member; 0: the settings' own
	Period     float64 // required period, minutes; 0: none
	Sides      int     // sides exposed, 3 or 4; 0: four
	Boxed      bool    // protected in a box: A_m/V of the box
}
