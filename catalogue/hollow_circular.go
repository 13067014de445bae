package catalogue

import "math"

// chsProperties computes the properties of a circular hollow section
// (EN 10210-2 and EN 10219-2, Annex B).
func chsProperties(s *Section) Properties {
	d, di := s.H, s.H-2*s.Tw
	i := math.Pi / 64 * (math.Pow(d, 4) - math.Pow(di, 4))
	p := Properties{
		A: math.Pi / 4 * (d*d - di*di), Iy: i, Iz: i,
		WelY: 2 * i / d, WelZ: 2 * i / d,
		WplY: (cube(d) - cube(di)) / 6, WplZ: (cube(d) - cube(di)) / 6,
		It: 2 * i, Wt: 4 * i / d,
		Perimeter: math.Pi * d,
	}
	p.principalAreYZ()
	return p
}
