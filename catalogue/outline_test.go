package catalogue

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// point is y, z of a drawing.
type point struct{ y, z float64 }

// pen draws an outline as a closed polygon, counterclockwise.
type pen struct{ points []point }

func (p *pen) to(y, z float64) { p.points = append(p.points, point{y, z}) }

// arcSteps is the number of chords of a quarter circle: what they leave of an
// area or a length is under (pi/2/arcSteps)^2/6 = 3e-6 of the arc's own, and twice that of a second moment.
const arcSteps = 400

// arc draws a quarter circle about (y, z) from the angle given in quarters,
// onwards or, for a hollow corner, backwards.
func (p *pen) arc(y, z, r float64, fromQuarter, direction int) {
	for i := range arcSteps + 1 {
		a := math.Pi / 2 * (float64(fromQuarter) + float64(direction)*float64(i)/arcSteps)
		p.to(y+r*math.Cos(a), z+r*math.Sin(a))
	}
}

// drawing is the outer outline and, for hollow sections, the inner one.
type drawing struct{ outer, inner []point }

// draw draws a section from its dimensions: I, H and hollow about their
// centre, channels from the middle of the web's back, angles from the heel.
func draw(s *Section) drawing {
	switch s.Shape {
	case ShapeI:
		return drawing{outer: drawI(s)}
	case ShapeChannel:
		return drawing{outer: drawChannel(s)}
	case ShapeAngle:
		return drawing{outer: drawAngle(s)}
	case ShapeCHS:
		return drawing{drawRounded(s.H, s.H, s.H/2), drawRounded(s.H-2*s.Tw, s.H-2*s.Tw, s.H/2-s.Tw)}
	default:
		return drawing{drawRounded(s.H, s.B, s.R), drawRounded(s.H-2*s.Tw, s.B-2*s.Tw, s.R2)}
	}
}

func drawRounded(h, b, r float64) []point {
	var p pen
	p.arc(b/2-r, h/2-r, r, 0, 1)
	p.arc(-b/2+r, h/2-r, r, 1, 1)
	p.arc(-b/2+r, -h/2+r, r, 2, 1)
	p.arc(b/2-r, -h/2+r, r, 3, 1)
	return p.points
}

func drawI(s *Section) []point {
	b, h, web, flange, r := s.B/2, s.H/2, s.Tw/2, s.H/2-s.Tf, s.R
	var p pen
	p.to(b, flange)
	p.to(b, h)
	p.to(-b, h)
	p.to(-b, flange)
	p.arc(-web-r, flange-r, r, 1, -1)
	p.arc(-web-r, -flange+r, r, 4, -1)
	p.to(-b, -flange)
	p.to(-b, -h)
	p.to(b, -h)
	p.to(b, -flange)
	p.arc(web+r, -flange+r, r, 3, -1)
	p.arc(web+r, flange-r, r, 2, -1)
	return p.points
}

func drawChannel(s *Section) []point {
	b, h, web, flange, r := s.B, s.H/2, s.Tw, s.H/2-s.Tf, s.R
	var p pen
	p.to(b, flange)
	p.to(b, h)
	p.to(0, h)
	p.to(0, -h)
	p.to(b, -h)
	p.to(b, -flange)
	p.arc(web+r, -flange+r, r, 3, -1)
	p.arc(web+r, flange-r, r, 2, -1)
	return p.points
}

func drawAngle(s *Section) []point {
	b, h, t, r, toe := s.B, s.H, s.Tw, s.R, s.R2
	var p pen
	p.to(0, h)
	p.to(0, 0)
	p.to(b, 0)
	p.arc(b-toe, t-toe, toe, 0, 1)
	p.arc(t+r, t+r, r, 3, -1)
	p.arc(t-toe, h-toe, toe, 0, 1)
	return p.points
}

// edges walks the polygon's edges; those of the inner outline run the other way.
func (d drawing) edges(f func(a, b point)) {
	for i, a := range d.outer {
		f(a, d.outer[(i+1)%len(d.outer)])
	}
	for i, a := range d.inner {
		f(d.inner[(i+1)%len(d.inner)], a)
	}
}

// moments of a polygon by Green's theorem, about the origin of the drawing.
type moments struct{ a, y, z, yy, zz, yz float64 }

func (d drawing) moments() (m moments) {
	d.edges(func(p, q point) {
		c := p.y*q.z - q.y*p.z
		m.a += c / 2
		m.y += (p.y + q.y) * c / 6
		m.z += (p.z + q.z) * c / 6
		m.yy += (p.y*p.y + p.y*q.y + q.y*q.y) * c / 12
		m.zz += (p.z*p.z + p.z*q.z + q.z*q.z) * c / 12
		m.yz += (p.y*q.z + 2*p.y*p.z + 2*q.y*q.z + q.y*p.z) * c / 24
	})
	return m
}

// central moves the second moments to the centroid.
func (m moments) central() moments {
	y, z := m.y/m.a, m.z/m.a
	return moments{m.a, y, z, m.yy - m.a*y*y, m.zz - m.a*z*z, m.yz - m.a*y*z}
}

func (d drawing) length() (l float64) {
	for i, a := range d.outer {
		b := d.outer[(i+1)%len(d.outer)]
		l += math.Hypot(b.y-a.y, b.z-a.z)
	}
	return l
}

// plastic is the first moment about the line z = c that halves the area.
func (d drawing) plastic() float64 {
	whole, lo, hi := d.moments().a, math.Inf(1), math.Inf(-1)
	for _, p := range d.outer {
		lo, hi = min(lo, p.z), max(hi, p.z)
	}
	for range 60 {
		c := (lo + hi) / 2
		if d.below(c).a < whole/2 {
			lo = c
		} else {
			hi = c
		}
	}
	under, all := d.below(lo), d.moments()
	return all.z - 2*under.z + lo*(2*under.a-all.a)
}

// below is the area and first moment of what lies under z = c: Green's theorem
// on the edges cut off there, with the cut itself adding its moment.
func (d drawing) below(c float64) (m moments) {
	d.edges(func(p, q point) {
		if p.z > c && q.z > c {
			return
		}
		cut := func(from, to point) point {
			t := (c - from.z) / (to.z - from.z)
			return point{from.y + t*(to.y-from.y), c}
		}
		if p.z > c {
			p = cut(q, p)
		} else if q.z > c {
			q = cut(p, q)
		}
		// Integrals of y dz and of y z dz along the edge.
		m.a += (p.y + q.y) / 2 * (q.z - p.z)
		m.z += (q.z - p.z) * (p.y*p.z/3 + q.y*q.z/3 + p.y*q.z/6 + q.y*p.z/6)
	})
	return m
}

// turned is the drawing with y and z exchanged.
func (d drawing) turned() drawing {
	turn := func(points []point) []point {
		out := make([]point, len(points))
		for i, p := range points {
			out[len(points)-1-i] = point{p.z, p.y} // the other way round again
		}
		return out
	}
	return drawing{turn(d.outer), turn(d.inner)}
}

// TestPropertiesAgreeWithTheDrawing holds every section of the catalogue
// against its outline drawn as a polygon and integrated by Green's theorem. The
// limit of 1e-5 is what the chords of the arcs leave (see arcSteps).
func TestPropertiesAgreeWithTheDrawing(t *testing.T) {
	const close = 1e-5
	for _, s := range Default().Sections() {
		d := draw(s)
		m := d.moments().central()
		near := func(what string, drawn, computed float64) {
			require.InEpsilon(t, drawn, computed, close, "%s: %s", s.Name(), what)
		}
		near("A", m.a, s.A)
		near("Iy", m.zz, s.Iy)
		near("Iz", m.yy, s.Iz)
		near("iy", math.Sqrt(m.zz/m.a), s.RadY)
		near("iz", math.Sqrt(m.yy/m.a), s.RadZ)
		near("perimeter", d.length(), s.Perimeter)
		least, most := point{math.Inf(1), math.Inf(1)}, point{math.Inf(-1), math.Inf(-1)}
		for _, p := range d.outer {
			least, most = point{min(least.y, p.y), min(least.z, p.z)}, point{max(most.y, p.y), max(most.z, p.z)}
		}
		near("Wel,y", m.zz/max(most.z-m.z, m.z-least.z), s.WelY)
		near("Wel,z", m.yy/max(most.y-m.y, m.y-least.y), s.WelZ)
		if s.Shape == ShapeAngle {
			continue // below
		}
		near("Wpl,y", d.plastic(), s.WplY)
		near("Wpl,z", d.turned().plastic(), s.WplZ)
		if s.Shape == ShapeChannel {
			near("cz", m.y, s.Cz)
		} else {
			require.InDelta(t, 0, m.y, 1e-6)
		}
	}
}

func TestAnglesAgreeWithTheDrawing(t *testing.T) {
	for _, s := range Default().Sections() {
		if s.Shape != ShapeAngle {
			continue
		}
		m := draw(s).moments().central()
		assert.InEpsilon(t, m.y, s.Cz, 1e-5, s.Name())
		assert.InEpsilon(t, m.z, s.Cy, 1e-5, s.Name())
		// About v-v, turned by alpha from z-z, the second moment is the least,
		// and the product about the principal axes vanishes.
		sin, cos := math.Sincos(s.AlphaV)
		iv := m.yy*cos*cos + m.zz*sin*sin + 2*m.yz*sin*cos
		iu := m.yy*sin*sin + m.zz*cos*cos - 2*m.yz*sin*cos
		assert.InEpsilon(t, iv, s.Iv, 1e-4, s.Name()) // a difference of greater values
		assert.InEpsilon(t, iu, s.Iu, 1e-5, s.Name())
		assert.InDelta(t, 0, ((m.zz-m.yy)*sin*cos+m.yz*(cos*cos-sin*sin))/s.Iu, 1e-5, s.Name())
		assert.InEpsilon(t, math.Sqrt(iv/m.a), s.RadV, 1e-4, s.Name())
		// The meeting point of the legs' middle lines, on the same axes.
		y, z := s.Tw/2-m.y, s.Tw/2-m.z
		assert.InDelta(t, y*cos+z*sin, s.U0, 1e-3, s.Name())
		assert.InDelta(t, -y*sin+z*cos, s.V0, 1e-3, s.Name())
	}
}
