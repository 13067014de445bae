package catalogue

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// warping is what a finite-element solution of St Venant torsion gives for a
// drawing: an independent way to It, Iw and the shear centre.
type warping struct {
	It, Iw float64
	y, z   float64 // shear centre from the centroid, mm
}

// squares is a drawing cut into squares of one size, with four nodes each.
type squares struct {
	size  float64
	nodes [][2]float64
	cells [][4]int
}

// cut keeps the squares whose middle lies inside the section. yMin and zMin
// are the lower left corner of the drawing.
func cut(s *Section, yMin, zMin, size float64) *squares {
	q := &squares{size: size}
	at := map[[2]int]int{}
	node := func(i, k int) int {
		n, ok := at[[2]int{i, k}]
		if !ok {
			n = len(q.nodes)
			at[[2]int{i, k}] = n
			q.nodes = append(q.nodes, [2]float64{yMin + float64(i)*size, zMin + float64(k)*size})
		}
		return n
	}
	for i := range int(math.Round(s.B / size)) {
		for k := range int(math.Round(s.H / size)) {
			if inside(s, yMin+(float64(i)+0.5)*size, zMin+(float64(k)+0.5)*size) {
				q.cells = append(q.cells, [4]int{node(i, k), node(i+1, k), node(i+1, k+1), node(i, k+1)})
			}
		}
	}
	return q
}

// corners of the unit square, in the order of a cell's nodes.
var corners = [4][2]float64{{0, 0}, {1, 0}, {1, 1}, {0, 1}}

// laplace is the stiffness of the square for unit conductivity, whatever its size.
var laplace = [4][4]float64{{4, -1, -2, -1}, {-1, 4, -1, -2}, {-2, -1, 4, -1}, {-1, -2, -1, 4}} // sixths

// times multiplies a vector by the assembled stiffness.
func (q *squares) times(x []float64) []float64 {
	out := make([]float64, len(x))
	for _, c := range q.cells {
		for i := range 4 {
			for k := range 4 {
				out[c[i]] += laplace[i][k] / 6 * x[c[k]]
			}
		}
	}
	return out
}

// over adds up f over the section, by 2 x 2 Gauss points of every square.
// f takes the shape functions and their slopes besides the place.
func (q *squares) over(f func(c *[4]int, n, ny, nz *[4]float64, y, z, da float64)) {
	g := [2]float64{0.5 - 0.5/math.Sqrt(3), 0.5 + 0.5/math.Sqrt(3)}
	for i := range q.cells {
		c := &q.cells[i]
		o := q.nodes[c[0]]
		for _, u := range g {
			for _, v := range g {
				var n, ny, nz [4]float64
				for k, p := range corners {
					fu, fv, du, dv := 1-u, 1-v, -1.0, -1.0
					if p[0] == 1 {
						fu, du = u, 1
					}
					if p[1] == 1 {
						fv, dv = v, 1
					}
					n[k], ny[k], nz[k] = fu*fv, du*fv/q.size, fu*dv/q.size
				}
				f(c, &n, &ny, &nz, o[0]+u*q.size, o[1]+v*q.size, q.size*q.size/4)
			}
		}
	}
}

// solveWarping finds the warping function w of the section: the least
// of the integral of (w_y - z)^2 + (w_z + y)^2, by conjugate gradients. The
// shear centre follows from Trefftz's condition, that warping about it does no
// work on bending.
func solveWarping(q *squares) warping {
	var a, cy, cz float64
	q.over(func(_ *[4]int, _, _, _ *[4]float64, y, z, da float64) { a, cy, cz = a+da, cy+y*da, cz+z*da })
	cy, cz = cy/a, cz/a
	load := make([]float64, len(q.nodes))
	var iyy, izz, iyz float64
	q.over(func(c *[4]int, _, ny, nz *[4]float64, y, z, da float64) {
		y, z = y-cy, z-cz
		iyy, izz, iyz = iyy+z*z*da, izz+y*y*da, iyz+y*z*da
		for k := range 4 {
			load[c[k]] += (ny[k]*z - nz[k]*y) * da
		}
	})
	w := conjugateGradients(q.times, load)
	res := warping{It: iyy + izz}
	for i := range w {
		res.It -= w[i] * load[i]
	}
	var s0, sy, sz float64 // of w, w y, w z
	q.over(func(c *[4]int, n, _, _ *[4]float64, y, z, da float64) {
		v := n[0]*w[c[0]] + n[1]*w[c[1]] + n[2]*w[c[2]] + n[3]*w[c[3]]
		s0, sy, sz = s0+v*da, sy+v*(y-cy)*da, sz+v*(z-cz)*da
	})
	// w about the point (py, pz) is w - pz y + py z + constant.
	det := izz*iyy - iyz*iyz
	res.z = (sy*iyy - sz*iyz) / det
	res.y = (sy*iyz - sz*izz) / det
	q.over(func(c *[4]int, n, _, _ *[4]float64, y, z, da float64) {
		v := n[0]*w[c[0]] + n[1]*w[c[1]] + n[2]*w[c[2]] + n[3]*w[c[3]]
		v += -res.z*(y-cy) + res.y*(z-cz) - s0/a
		res.Iw += v * v * da
	})
	return res
}

func dot(a, b []float64) (sum float64) {
	for i := range a {
		sum += a[i] * b[i]
	}
	return sum
}

func conjugateGradients(times func([]float64) []float64, b []float64) []float64 {
	x, r, p := make([]float64, len(b)), append([]float64(nil), b...), append([]float64(nil), b...)
	rr := dot(r, r)
	stop := rr * 1e-16
	for range 20 * len(b) {
		if rr <= stop {
			break
		}
		kp := times(p)
		alpha := rr / dot(p, kp)
		for i := range x {
			x[i] += alpha * p[i]
			r[i] -= alpha * kp[i]
		}
		next := dot(r, r)
		for i := range p {
			p[i] = r[i] + next/rr*p[i]
		}
		rr = next
	}
	return x
}

// place returns the lower left corner of a section's drawing.
func place(s *Section) (yMin, zMin float64) {
	switch s.Shape {
	case ShapeChannel:
		return 0, -s.H / 2
	case ShapeAngle:
		return 0, 0
	}
	return -s.B / 2, -s.H / 2
}

// TestTorsionAgreesWithFiniteElements holds the closed expressions for It, Iw
// and the shear centre against St Venant's problem solved on the drawing. The
// sections are those whose faces fall on a grid of 1 mm (0.5 mm for the
// I sections); the squares leave under 1 %. The limits are the 2 % that section
// tables differ by, where no other is named.
func TestTorsionAgreesWithFiniteElements(t *testing.T) {
	for _, c := range []struct {
		name     string
		size, it float64
	}{
		{"HE 160 B", 0.5, 0.02},
		{"HE 200 A", 0.5, 0.02},
		{"200x90x30 UKPFC", 1, 0.02},
		{"260x90x35 UKPFC", 1, 0.02},
		{"UPE 200", 1, 0.02},
		{"RHS 200x100x8.0", 1, 0.025},  // the annex takes the flow in the corners along the middle line:
		{"SHS 150x150x10.0", 1, 0.025}, // 2.0 % under St Venant's value
		{"L 100x100x10", 1, 0.025},     // the expression of the tables is 2.2 % over St Venant's value
		{"L 150x90x10", 1, 0.025},
	} {
		s, err := Default().Find(c.name, FindOptions{})
		require.NoError(t, err)
		yMin, zMin := place(s)
		w := solveWarping(cut(s, yMin, zMin, c.size))
		assert.InEpsilon(t, w.It, s.It, c.it, "%s It", c.name)
		switch s.Shape {
		case ShapeI:
			assert.InEpsilon(t, w.Iw, s.Iw, 0.03, "%s Iw: the tables' expression bends the flanges alone", c.name)
		case ShapeChannel:
			assert.InEpsilon(t, w.Iw, s.Iw, 0.02, "%s Iw", c.name)
			// A channel's thin-walled shear centre lies up to 3 % too far out,
			// which lowers the critical force.
			assert.InDelta(t, 0, w.z, 0.1)
			assert.Negative(t, w.y)
			assert.Greater(t, s.Y0, -w.y, c.name)
			assert.InEpsilon(t, -w.y, s.Y0, 0.031, "%s y0", c.name)
		case ShapeAngle:
			// The meeting point of the middle lines lies up to 4 % too far out,
			// which lowers the critical force too.
			assert.Greater(t, math.Hypot(s.U0, s.V0), math.Hypot(w.y, w.z), c.name)
			assert.InEpsilon(t, math.Hypot(w.y, w.z), math.Hypot(s.U0, s.V0), 0.042, "%s shear centre", c.name)
			// Iw of an angle is left out: against G It over the shortest column
			// that the legs' own length allows it is small.
			assert.Less(t, math.Pi*math.Pi*210000*w.Iw/square(10*s.H), 0.1*81000*s.It, "%s Iw", c.name)
		}
	}
}

// inside says whether a point of the drawing is steel.
func inside(s *Section, y, z float64) bool {
	switch s.Shape {
	case ShapeI:
		y, z = math.Abs(y), math.Abs(z)
		hw := s.H/2 - s.Tf
		if z > s.H/2 || y > s.B/2 {
			return false
		}
		if z >= hw || y <= s.Tw/2 {
			return true
		}
		u, v := y-s.Tw/2, hw-z
		return u < s.R && v < s.R && math.Hypot(s.R-u, s.R-v) >= s.R
	case ShapeChannel: // y from the back of the web
		z = math.Abs(z)
		hw := s.H/2 - s.Tf
		if z > s.H/2 || y < 0 || y > s.B {
			return false
		}
		if z >= hw || y <= s.Tw {
			return true
		}
		u, v := y-s.Tw, hw-z
		return u < s.R && v < s.R && math.Hypot(s.R-u, s.R-v) >= s.R
	case ShapeCHS:
		r := math.Hypot(y, z)
		return r <= s.H/2 && r >= s.H/2-s.Tw
	case ShapeRHS:
		in := func(h, b, r float64) bool {
			y, z := math.Abs(y), math.Abs(z)
			if y > b/2 || z > h/2 {
				return false
			}
			u, v := y-(b/2-r), z-(h/2-r)
			return u <= 0 || v <= 0 || math.Hypot(u, v) <= r
		}
		return in(s.H, s.B, s.R) && !in(s.H-2*s.Tw, s.B-2*s.Tw, s.R2)
	default: // angle, from the corner of the outer faces
		if y < 0 || z < 0 || y > s.B || z > s.H {
			return false
		}
		toe := func(along, across, leg float64) bool {
			u, v := along-(leg-s.R2), across-(s.Tw-s.R2)
			return u <= 0 || v <= 0 || math.Hypot(u, v) <= s.R2
		}
		if y <= s.Tw {
			return toe(z, y, s.H) || z <= s.Tw
		}
		if z <= s.Tw {
			return toe(y, z, s.B)
		}
		u, v := y-s.Tw, z-s.Tw
		return u < s.R && v < s.R && math.Hypot(s.R-u, s.R-v) >= s.R
	}
}
