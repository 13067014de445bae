package catalogue

// Shape says which formulas and which rules of the standard a section follows.
type Shape uint8

// The shapes in the catalogue.
const (
	ShapeI       Shape = iota // doubly symmetric rolled I and H
	ShapeChannel              // parallel-flange channel, symmetric about y-y
	ShapeCHS                  // circular hollow
	ShapeRHS                  // square and rectangular hollow
	ShapeAngle                // equal and unequal angle
)

func (s Shape) hollow() bool { return s == ShapeCHS || s == ShapeRHS }

// Finish tells how a hollow section was formed; other shapes have none.
type Finish uint8

// The finishes of hollow sections.
const (
	FinishNone Finish = iota
	HotFinished
	ColdFormed
)

// Section is one line of the catalogue or of a user's stock list.
type Section struct {
	Designation string // as in the product tables: "203x203x60 UKC", "SHS 100x100x5.0"
	Family      string // UKC, UKB, UKBP, HEA, ..., UKPFC, UPE, CHS, SHS, RHS, L equal, L unequal
	Standard    string // product standard, "EN 10365:2017"
	Nominal     string // serial size: "203x203"
	Shape       Shape
	Finish      Finish

	// Dimensions, mm.
	H  float64 // overall depth; outside diameter of a CHS; longer leg of an angle
	B  float64 // overall width; outside diameter of a CHS; shorter leg of an angle
	Tw float64 // web thickness; wall or leg thickness of hollow sections and angles
	Tf float64 // flange thickness; wall or leg thickness of hollow sections and angles
	R  float64 // root radius; outer corner radius of an RHS
	R2 float64 // toe radius of an angle; inner corner radius of an RHS

	Mass float64 // nominal, kg/m: the published figure, by which steel is bought

	Properties
}

// Properties are computed from the dimensions, root fillets and corner radii
// included.
type Properties struct {
	A          float64 // area, mm2
	Iy, Iz     float64 // second moments of area, mm4
	RadY, RadZ float64 // radii of gyration i_y, i_z, mm
	WelY, WelZ float64 // least elastic section moduli, mm3
	WplY, WplZ float64 // plastic section moduli, mm3 (angles: 0, moments on them being refused)
	It         float64 // St Venant torsion constant, mm4
	Iw         float64 // warping constant about the shear centre, mm6 (0 where negligible: hollow sections, angles)
	Wt         float64 // torsional section modulus of hollow sections, EN 10210-2 Annex B, mm3
	Y0         float64 // channels: shear centre from the centroid along y-y, mm, beyond the web
	Cz         float64 // channels: z-z from the back of the web, mm; angles: z-z (parallel to the longer leg) from the longer leg's outer face
	Cy         float64 // angles: y-y (parallel to the shorter leg) from the shorter leg's outer face, mm
	Iu, Iv     float64 // principal second moments, mm4, Iu >= Iv (Iy, Iz for other shapes)
	RadU, RadV float64 // principal radii of gyration, mm
	AlphaV     float64 // angles: angle between z-z and v-v, radians
	U0, V0     float64 // angles: shear centre from the centroid along u-u and v-v, mm
	Perimeter  float64 // painted surface per length, mm2/mm: the outside only for hollow sections
}

// Thickness returns the thickness, in mm, that decides the yield strength: the
// flange's of I, H and channel sections, the wall's or leg's otherwise.
func (s *Section) Thickness() float64 { return s.Tf }

// Name returns the name that the program writes: the designation, with " CF"
// behind it for a cold-formed hollow section. Where cold formed is the setting,
// only FullName reads back as a hot-finished one.
func (s *Section) Name() string {
	if s.Finish == ColdFormed {
		return s.Designation + " CF"
	}
	return s.Designation
}

// FullName returns the name with the finish of a hollow section stated, which
// reads back as this section whatever FindOptions say.
func (s *Section) FullName() string {
	if s.Finish == HotFinished {
		return s.Designation + " HF"
	}
	return s.Name()
}
