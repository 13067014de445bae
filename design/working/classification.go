package working

import (
	"fmt"
	"strings"

	"stanchion/catalogue"
	"stanchion/design/ec3"
	"stanchion/design/working/formula"
)

// classification writes the class in pure compression and, of class 4, the
// effective area.
func (w *writer) classification() {
	w.start("Classification in compression")
	for i := range w.c.Elements {
		w.element(&w.c.Elements[i], i)
	}
	if len(w.c.Elements) > 1 || w.c.Class == 4 {
		w.say("The section is class %d in compression.", w.c.Class)
	}
	if w.c.Class == 4 {
		w.effectiveArea()
	}
}

// part is how the width of an element follows from the dimensions.
type part struct{ symbol, thickness, formula string }

// part returns the width of element i of the section.
func (w *writer) part(i int) part {
	switch w.c.Section.Shape {
	case catalogue.ShapeI:
		return [...]part{{"c_f", "t_f", "(b - t_w - 2 r)/2"}, {"c_w", "t_w", "h - 2 t_f - 2 r"}}[i]
	case catalogue.ShapeChannel:
		return [...]part{{"c_f", "t_f", "b - t_w - r"}, {"c_w", "t_w", "h - 2 t_f - 2 r"}}[i]
	case catalogue.ShapeRHS:
		return [...]part{{"c_h", "t", "h - 3 t"}, {"c_b", "t", "b - 3 t"}}[i]
	case catalogue.ShapeCHS:
		return part{"d", "t", ""}
	}
	return [...]part{{"h", "t", ""}, {"", "t", "(b + h)/(2 t)"}}[i]
}

// element writes the width, slenderness and class of one element.
func (w *writer) element(e *ec3.Element, i int) {
	p := w.part(i)
	if p.formula != "" && p.symbol != "" {
		w.find(p.symbol, p.formula, e.C, Mm, "").Note = e.Name
	}
	ratio := p.symbol + "/" + p.thickness
	if p.symbol == "" {
		ratio = p.formula
	}
	s := w.step(left(ratio), ratio, e.Ratio, None, "Table 5.2")
	s.Formula = nil
	s.Note = w.classOf(e)
}

// classOf says which class an element has and by which limit.
func (w *writer) classOf(e *ec3.Element) string {
	if e.Class == 4 {
		return fmt.Sprintf("> %s: class 4", w.limit(e, 3))
	}
	return fmt.Sprintf("≤ %s: class %d", w.limit(e, e.Class), e.Class)
}

// limit writes the limit of a class: "33 ε = 26.85".
func (w *writer) limit(e *ec3.Element, class int) string {
	value := e.Limits[class-1]
	unit, text := w.c.Eps, "ε"
	if w.c.Section.Shape == catalogue.ShapeCHS {
		unit, text = unit*unit, "ε²"
	}
	factor := strings.TrimSuffix(fixed(value/unit, 1), ".0")
	return fmt.Sprintf("%s %s = %s", factor, text, print(value, None, 4).Figures)
}

// effectiveArea writes A_eff. EN 1993-1-5:2006 4.4.
func (w *writer) effectiveArea() {
	ineffective := ""
	for i := range w.c.Elements {
		e := &w.c.Elements[i]
		lambdaP, rho := e.Rho(w.c.Eps)
		if rho >= 1 {
			continue
		}
		p := w.part(i)
		tail := strings.TrimPrefix(p.symbol, "c_")
		k, source := "4", "(λ̄_p,# - 0.22)/λ̄_p,#^2"
		clause := "EN 1993-1-5 (4.2)"
		if !e.Internal {
			k, source, clause = "0.43", "(λ̄_p,# - 0.188)/λ̄_p,#^2", "EN 1993-1-5 (4.3)"
		}
		w.find("λ̄_p,"+tail, fmt.Sprintf("(%s/%s)/(28.4 ε √(%s))", p.symbol, p.thickness, k), lambdaP, None, "EN 1993-1-5 4.4(2)").Note = e.Name
		w.find("ρ_"+tail, strings.ReplaceAll(source, "#", tail), rho, None, clause)
		ineffective += fmt.Sprintf(" - %s (1 - ρ_%s) %s %s", count(e.Count), tail, p.symbol, p.thickness)
	}
	w.find("A_eff", "A"+strings.ReplaceAll(ineffective, "  ", " "), w.c.AEff, Mm2, "6.2.2.5")
}

func count(n int) string {
	if n == 1 {
		return ""
	}
	return fmt.Sprint(n)
}

// left reads the left side of a step.
func left(source string) formula.Expr { return formula.Must(source) }
