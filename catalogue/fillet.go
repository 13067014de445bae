package catalogue

import "math"

// A fillet is the area between a circular arc of radius r and the two edges at
// right angles that it touches. Its values follow from the square less the
// quarter circle.
const (
	filletArea     = 1 - math.Pi/4                                                                    // times r^2
	filletCentroid = (10 - 3*math.Pi) / (12 - 3*math.Pi)                                              // times r, from either edge
	filletInertia  = 1.0/3 - math.Pi/16 - 1/(9*(4-math.Pi))                                           // times r^4, about its own centroid
	filletProduct  = (1.0/4 - (math.Pi/4 - 2.0/3 + 1.0/8)) - filletArea*filletCentroid*filletCentroid // times r^4, about its own centroid
)

// part is a piece of a cross-section: its area, centroid and second moments
// about its own centroid, in any one pair of axes. Voids have negative values.
type part struct {
	A, y, z       float64
	Iyy, Izz, Iyz float64 // of z^2, of y^2, of y*z
}

func rectangle(y0, y1, z0, z1 float64) part {
	b, h := y1-y0, z1-z0
	return part{A: b * h, y: (y0 + y1) / 2, z: (z0 + z1) / 2, Iyy: b * h * h * h / 12, Izz: h * b * b * b / 12}
}

// fillet is the fillet at the corner (y, z), lying towards the sides that sy
// and sz (+1 or -1) point to. times is +1 where it adds area, -1 where it is
// cut away.
func fillet(y, z, sy, sz, r, times float64) part {
	r2, r4 := r*r, r*r*r*r
	return part{
		A: times * filletArea * r2,
		y: y + sy*filletCentroid*r, z: z + sz*filletCentroid*r,
		Iyy: times * filletInertia * r4, Izz: times * filletInertia * r4,
		Iyz: times * sy * sz * filletProduct * r4,
	}
}

// sum adds parts up about their common centroid (parallel-axis theorem).
func sum(parts ...part) part {
	var t part
	for _, p := range parts {
		t.A += p.A
		t.y += p.A * p.y
		t.z += p.A * p.z
	}
	t.y /= t.A
	t.z /= t.A
	for _, p := range parts {
		dy, dz := p.y-t.y, p.z-t.z
		t.Iyy += p.Iyy + p.A*dz*dz
		t.Izz += p.Izz + p.A*dy*dy
		t.Iyz += p.Iyz + p.A*dy*dz
	}
	return t
}
