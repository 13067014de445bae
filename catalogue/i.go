package catalogue

import (
	"math"
	"strings"
)

// iProperties computes the properties of a doubly symmetric rolled I or H
// section with one root fillet of radius r at each junction of web and flange.
func iProperties(s *Section) Properties {
	h, b, tw, tf, r := s.H, s.B, s.Tw, s.Tf, s.R
	hw := h - 2*tf
	parts := []part{
		rectangle(-b/2, b/2, -h/2, -h/2+tf),
		rectangle(-b/2, b/2, h/2-tf, h/2),
		rectangle(-tw/2, tw/2, -hw/2, hw/2),
	}
	for _, sy := range []float64{-1, 1} {
		for _, sz := range []float64{-1, 1} {
			parts = append(parts, fillet(sy*tw/2, sz*hw/2, sy, -sz, r, 1))
		}
	}
	t := sum(parts...)
	af, ef := filletArea*r*r, filletCentroid*r
	p := Properties{
		A: t.A, Iy: t.Iyy, Iz: t.Izz,
		WelY: 2 * t.Iyy / h, WelZ: 2 * t.Izz / b,
		WplY: b*tf*(h-tf) + tw*hw*hw/4 + 4*af*(hw/2-ef),
		WplZ: b*b*tf/2 + hw*tw*tw/4 + 4*af*(tw/2+ef),
		It:   iTorsion(s),
		Iw:   tf * b * b * b * (h - tf) * (h - tf) / 24,
		// Each fillet of the outline replaces two edges of length r by a quarter circle.
		Perimeter: 4*b + 2*h - 2*tw - (8-2*math.Pi)*r,
	}
	p.principalAreYZ()
	return p
}

// iTorsion is the St Venant torsion constant by the expression that the
// family's own tables follow.
func iTorsion(s *Section) float64 {
	if strings.HasPrefix(s.Family, "UK") {
		return torsionElDarwishJohnston(s)
	}
	return torsionEuropean(s)
}

// torsionElDarwishJohnston is the expression of El Darwish and Johnston,
// "Torsion of structural shapes", Journal of the Structural Division, ASCE 91
// (1965), for parallel-flange I sections with root fillets; the UK section
// tables follow it.
func torsionElDarwishJohnston(s *Section) float64 {
	h, b, tw, tf, r := s.H, s.B, s.Tw, s.Tf, s.R
	d := ((tf+r)*(tf+r) + (r+0.25*tw)*tw) / (2*r + tf)
	alpha := -0.042 + 0.2204*tw/tf + 0.1355*r/tf - 0.0865*r*tw/(tf*tf) - 0.0725*tw*tw/(tf*tf)
	return 2.0/3*b*cube(tf) + (h-2*tf)*cube(tw)/3 + 2*alpha*math.Pow(d, 4) - 0.420*math.Pow(tf, 4)
}

// torsionEuropean is the expression that the European HE, HD and IPE tables follow.
func torsionEuropean(s *Section) float64 {
	h, b, tw, tf, r := s.H, s.B, s.Tw, s.Tf, s.R
	d := (square(r+tw/2) + square(r+tf) - r*r) / (2*r + tf)
	return 2.0/3*(b-0.63*tf)*cube(tf) + (h-2*tf)*cube(tw)/3 + 2*(tw/tf)*(0.145+0.1*r/tf)*math.Pow(d, 4)
}

func square(x float64) float64 { return x * x }
func cube(x float64) float64   { return x * x * x }

// principalAreYZ fills in what a section has whose principal axes are y-y and z-z.
func (p *Properties) principalAreYZ() {
	p.RadY, p.RadZ = math.Sqrt(p.Iy/p.A), math.Sqrt(p.Iz/p.A)
	p.Iu, p.Iv, p.RadU, p.RadV = p.Iy, p.Iz, p.RadY, p.RadZ
}
