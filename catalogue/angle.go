package catalogue

import "math"

// angleProperties computes the properties of an angle with root radius R and
// toe radii R2. y runs along the shorter leg, z along the longer; both outer
// faces stand on the axes of the computation.
func angleProperties(s *Section) Properties {
	h, b, t := s.H, s.B, s.Tw
	g := sum(
		rectangle(0, t, 0, h),
		rectangle(t, b, 0, t),
		fillet(t, t, 1, 1, s.R, 1),
		fillet(t, h, -1, -1, s.R2, -1), // toe of the longer leg
		fillet(b, t, -1, -1, s.R2, -1), // toe of the shorter leg
	)
	p := Properties{
		A: g.A, Iy: g.Iyy, Iz: g.Izz, Cz: g.y, Cy: g.z,
		RadY: math.Sqrt(g.Iyy / g.A), RadZ: math.Sqrt(g.Izz / g.A),
		WelY: g.Iyy / (h - g.z), WelZ: g.Izz / (b - g.y),
		It: angleTorsion(s),
		// Two outer faces, two toes and two inner faces, less what the three arcs cut off.
		Perimeter: 2*(h+b) - (2-math.Pi/2)*(s.R+2*s.R2),
	}
	mean, half := (p.Iy+p.Iz)/2, (p.Iy-p.Iz)/2
	radius := math.Hypot(half, g.Iyz)
	p.Iu, p.Iv = mean+radius, mean-radius
	p.RadU, p.RadV = math.Sqrt(p.Iu/p.A), math.Sqrt(p.Iv/p.A)

	// The direction of u-u is turned from y by phi: Iyz is that of y*z, so the
	// axis of the greatest second moment has tan(2 phi) = -Iyz/half.
	phi := math.Atan2(-g.Iyz, half) / 2
	p.AlphaV = math.Abs(phi)
	// The shear centre stands where the middle lines of the legs meet.
	y0, z0 := t/2-g.y, t/2-g.z
	p.U0 = y0*math.Cos(phi) + z0*math.Sin(phi)
	p.V0 = -y0*math.Sin(phi) + z0*math.Cos(phi)
	if s.H == s.B {
		// Symmetric about u-u: what is left of V0 is rounding.
		p.V0 = 0
	}
	return p
}

// angleTorsion is the expression of El Darwish and Johnston (1965) for angles,
// which the UK tables follow (from memory).
func angleTorsion(s *Section) float64 {
	t, r := s.Tw, s.R
	alpha := 0.0768 + 0.0479*r/t
	d := 2 * (3*r + 2*t - math.Sqrt2*(2*r+t))
	return s.H*cube(t)/3 + (s.B-t)*cube(t)/3 + alpha*math.Pow(d, 4) - 0.21*math.Pow(t, 4)
}
