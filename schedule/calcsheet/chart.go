package calcsheet

import (
	"math"
	"slices"

	"stanchion/design/working"
)

// chart draws the buckling curves of the column with its points on them.
func chart(c canvas, s *working.Sheet, x, y, w, h float64) {
	p := newPlot(c, s, x+6, y+3, w-10, h-11)
	p.grid()
	var drawn []string
	for _, point := range s.Points {
		if !slices.Contains(drawn, point.Curve) {
			drawn = append(drawn, point.Curve)
			p.curve(point.Curve, len(drawn))
		}
	}
	p.euler()
	for i := range s.Points {
		p.point(&s.Points[i])
	}
	p.key(y + h - 0.6)
}

// plot is a chart of chi over lambdaBar.
type plot struct {
	canvas     canvas
	sheet      *working.Sheet
	x, y, w, h float64
	most       float64 // greatest slenderness shown
}

func newPlot(c canvas, s *working.Sheet, x, y, w, h float64) *plot {
	most := 2.0
	for _, p := range s.Points {
		most = max(most, math.Ceil(p.LambdaBar*1.1*2)/2)
	}
	return &plot{c, s, x, y, w, h, min(most, 8)}
}

// at returns where a value stands.
func (p *plot) at(lambda, chi float64) point {
	return point{p.x + p.w*min(lambda/p.most, 1), p.y + p.h*(1-chi/1.05)}
}

func (p *plot) grid() {
	step := 0.5
	if p.most > 4 {
		step = 1
	}
	for v := 0.0; v <= p.most; v += step {
		a := p.at(v, 0)
		p.canvas.line(a.x, a.y, a.x, p.y, faint)
		write(p.canvas, a.x, a.y+2.3, decimal(v), upright, 5*pt, atMiddle)
	}
	for v := 0.0; v < 1.01; v += 0.2 {
		a := p.at(0, v)
		p.canvas.line(a.x, a.y, p.x+p.w, a.y, faint)
		write(p.canvas, a.x-0.8, a.y+0.6, decimal(v), upright, 5*pt, atRight)
	}
	o := p.at(0, 0)
	p.canvas.polyline([]point{{o.x, p.y}, o, {p.x + p.w, o.y}}, usualLine)
	chi := textBox("χ", italic, 1)
	draw(p.canvas, &chi, p.x-4.8, p.y+0.6, 7*pt)
	lambda := textBox("λ", italic, 1)
	lambda.line(0.1, 0.81, lambda.w, 0.81)
	draw(p.canvas, &lambda, p.x+p.w+0.4, o.y-0.4, 7*pt)
}

func decimal(v float64) string {
	return string(rune('0'+int(v+1e-9))) + "." + string(rune('0'+int(math.Round(v*10))%10))
}

// curve draws a buckling curve with its letter.
func (p *plot) curve(name string, order int) {
	var list []point
	for i := 0; i <= 60; i++ {
		v := p.most * float64(i) / 60
		list = append(list, p.at(v, working.Chi(name, v)))
	}
	p.canvas.polyline(list, usualLine)
	v := p.most * (0.30 + 0.16*float64(order))
	a := p.at(v, working.Chi(name, v))
	write(p.canvas, a.x+0.6, a.y-0.6, name, bold, 6*pt, atLeft)
}

// euler draws the elastic critical load, 1/lambdaBar2.
func (p *plot) euler() {
	var list []point
	for i := 0; i <= 40; i++ {
		v := 1 + (p.most-1)*float64(i)/40
		list = append(list, p.at(v, 1/(v*v)))
	}
	p.canvas.polyline(list, dashed)
}

// point marks a resistance: y filled round, z filled square, torsion a
// triangle.
func (p *plot) point(at *working.Point) {
	a := p.at(at.LambdaBar, at.Chi)
	p.canvas.line(a.x, a.y, a.x, p.at(0, 0).y, thinLine)
	p.canvas.line(a.x, a.y, p.x, a.y, thinLine)
	symbol(p.canvas, at.Axis, a, 0.9)
}

// symbol draws the mark of an axis.
func symbol(c canvas, axis string, a point, r float64) {
	switch axis {
	case "z", "v":
		rectangle(c, a.x-r, a.y-r, 2*r, 2*r, 0)
	case "T":
		c.polygon([]point{{a.x - r*1.1, a.y + r}, {a.x + r*1.1, a.y + r}, {a.x, a.y - 1.2*r}}, 0)
	default:
		var list []point
		for i := range 16 {
			t := float64(i) / 16 * 2 * math.Pi
			list = append(list, point{a.x + r*math.Cos(t), a.y + r*math.Sin(t)})
		}
		c.polygon(list, 0)
	}
}

// key says which mark is which.
func (p *plot) key(y float64) {
	x := p.x
	for i := range p.sheet.Points {
		at := &p.sheet.Points[i]
		symbol(p.canvas, at.Axis, point{x + 1, y - 0.8}, 0.8)
		name := at.Axis + "-" + at.Axis
		if at.Axis == "T" {
			name = "torsion"
		}
		write(p.canvas, x+2.4, y, name, upright, 5.6*pt, atLeft)
		x += 4.2 + upright.width(name)*5.6*pt
	}
	p.canvas.line(x, y-0.8, x+4, y-0.8, dashed)
	write(p.canvas, x+4.8, y, "elastic", upright, 5.6*pt, atLeft)
}
