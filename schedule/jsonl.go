package schedule

import (
	"bufio"
	"encoding/json"
	"io"

	"stanchion/design"
)

// JSONLines writes results as JSON lines for other programs, one object a
// member. The keys and their order are fixed; a value that does not apply is
// null.
type JSONLines struct {
	w   *bufio.Writer
	enc *json.Encoder
}

// jsonLine is one line. The fields stand in the order of the keys.
type jsonLine struct {
	Mark        *string  `json:"mark"`
	Stack       *string  `json:"stack"`
	From        *string  `json:"from"`
	To          *string  `json:"to"`
	Quantity    *int     `json:"quantity"`
	Status      *string  `json:"status"`
	Note        *string  `json:"note"`
	Section     *string  `json:"section"`
	Grade       *string  `json:"grade"`
	Utilisation *float64 `json:"utilisation"`
	Axis        *string  `json:"axis"`
	Check       *string  `json:"check"`
	Clause      *string  `json:"clause"`
	Combination *string  `json:"combination"`
	Segment     *string  `json:"segment"`
	NEd         *float64 `json:"N_Ed_kN"`
	NbyRd       *float64 `json:"N_b_y_Rd_kN"`
	NbzRd       *float64 `json:"N_b_z_Rd_kN"`
	NbTRd       *float64 `json:"N_b_T_Rd_kN"`
	MbRd        *float64 `json:"M_b_Rd_kNm"`
	LcrY        *float64 `json:"L_cr_y_m"`
	LcrZ        *float64 `json:"L_cr_z_m"`
	LT          *float64 `json:"L_T_m"`
	LambdaBarY  *float64 `json:"lambda_bar_y"`
	LambdaBarZ  *float64 `json:"lambda_bar_z"`
	ChiY        *float64 `json:"chi_y"`
	ChiZ        *float64 `json:"chi_z"`
	CurveY      *string  `json:"curve_y"`
	CurveZ      *string  `json:"curve_z"`
	Class       *int     `json:"class"`
	Fy          *float64 `json:"fy_MPa"`
	MassPerM    *float64 `json:"mass_kg_m"`
	Mass        *float64 `json:"mass_kg"`
	NextLighter *string  `json:"next_lighter"`
	NextUtil    *float64 `json:"next_lighter_utilisation"`
	NextCheck   *string  `json:"next_lighter_check"`
	Cell        *string  `json:"cell"`
	Critical    *float64 `json:"critical_temperature_C"`
}

// NewJSONLines returns a writer of JSON lines.
func NewJSONLines(w io.Writer) *JSONLines {
	b := bufio.NewWriterSize(w, 1<<16)
	j := &JSONLines{w: b, enc: json.NewEncoder(b)}
	j.enc.SetEscapeHTML(false)
	return j
}

// Write writes the line of one member.
func (j *JSONLines) Write(m *Member, r *design.Result) error {
	c, g := &m.Column, &r.Governing
	l := jsonLine{
		Mark: str(c.Mark), Stack: str(c.Stack), From: str(c.From), To: str(c.To), Quantity: &c.Quantity,
		Status: str(r.Status.String()), Note: str(Note(m, r)), Cell: str(c.Cell),
		Section: str(r.Section), Grade: str(r.Grade),
		Axis: str(AxisName(g.Kind)), Check: str(CheckName(g.Kind)), Clause: str(g.Clause),
		Combination: str(governingCombination(m, r)), Segment: str(governingSegment(m, r)),
		NbyRd: num(r.Y.NbRd / 1e3), NbzRd: num(r.Z.NbRd / 1e3), NbTRd: num(torsional(r).NbRd / 1e3), MbRd: num(r.MbRd / 1e6),
		LcrY: num(r.Y.Lcr / 1e3), LcrZ: num(r.Z.Lcr / 1e3), LT: num(torsional(r).Lcr / 1e3),
		LambdaBarY: num(r.Y.LambdaBar), LambdaBarZ: num(r.Z.LambdaBar), ChiY: num(r.Y.Chi), ChiZ: num(r.Z.Chi),
		CurveY: str(r.Y.Curve), CurveZ: str(r.Z.Curve), Class: whole(r.Class), Fy: num(r.Fy),
		MassPerM: num(r.MassPerM), Mass: num(r.Mass),
		NextLighter: str(r.NextLighter), NextUtil: num(r.NextLighterUtilisation), NextCheck: str(CheckName(r.NextLighterCheck.Kind)),
		Critical: num(r.Fire.CriticalTemperature),
	}
	if r.Section != "" && finite(r.Utilisation) {
		x := Round(r.Utilisation)
		l.Utilisation = &x
	}
	if g.Kind != design.KindNone && g.Kind != design.Refused {
		x := Round(g.NEd / 1e3)
		l.NEd = &x
	}
	return j.enc.Encode(&l)
}

// Flush writes what is still held back.
func (j *JSONLines) Flush() error { return j.w.Flush() }

func str(s string) *string {
	if s == "" {
		return nil
	}
	return &s
}

func num(x float64) *float64 {
	if !usable(x) {
		return nil
	}
	x = Round(x)
	return &x
}

func whole(x int) *int {
	if x == 0 {
		return nil
	}
	return &x
}
