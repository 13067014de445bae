package ec3

import (
	"fmt"
	"math"

	"stanchion/design"
)

// DefaultFireRatio is the load ratio eta_fi taken where a period is required
// and none is given. EN 1993-1-2:2005 2.4.2(3), note 2.
const DefaultFireRatio = 0.65

// AssessFire works out the critical temperature of the member in the
// candidate, and the time that it takes unprotected steel to reach it under
// the standard fire. The zero result says that the schedule and the settings
// ask for neither. It is made for the section that was chosen, not for a
// search: it allocates.
func (m *Member) AssessFire(c *Candidate) design.FireResult {
	result := fireDemand(m.Column, m.Settings)
	if !result.Asked {
		return design.FireResult{} // before anything is allocated: a long schedule asks this of every member
	}
	f := fireAssessment{candidate: c, member: m, result: result}
	f.gammaMfi = m.Settings.National.GammaMfi
	if f.gammaMfi == 0 {
		f.gammaMfi = 1
	}
	f.exposure()
	if err := f.lengths(); err != nil {
		f.result.Reason = "in fire: " + err.Error()
		return f.result
	}
	f.criticalTemperature()
	if f.result.CriticalTemperature > 0 {
		f.time()
	}
	return f.result
}

// fireDemand says what is asked of a column in fire: its own load ratio and
// period before the settings'.
func fireDemand(col *design.Column, set *design.Settings) design.FireResult {
	r := design.FireResult{LoadRatio: set.FireRatio, Period: set.FirePeriod}
	if col.Fire.LoadRatio > 0 {
		r.LoadRatio = col.Fire.LoadRatio
	}
	if col.Fire.Period > 0 {
		r.Period = col.Fire.Period
	}
	r.Asked = r.LoadRatio > 0 || r.Period > 0
	if r.LoadRatio == 0 {
		r.LoadRatio = DefaultFireRatio
	}
	return r
}

// fireAssessment is the work of one AssessFire.
type fireAssessment struct {
	candidate *Candidate
	member    *Member // as given
	gammaMfi  float64
	result    design.FireResult

	hot     Member     // the member with its buckling lengths in fire
	segment Assessment // its segments in the candidate
}

// lengths makes the member with its buckling lengths in fire: those given,
// else the ambient ones, which a note names. A length given about z-z is also
// the torsional one unless that is given in its own right, as at ambient
// temperature. EN 1993-1-2:2005 4.2.3.2(4) and (5).
func (f *fireAssessment) lengths() error {
	col := *f.member.Column
	set := *f.member.Settings
	given := &col.Fire
	if given.LcrY > 0 {
		col.Y.Lcr = given.LcrY
	}
	if given.LcrZ > 0 {
		col.Z.Lcr = given.LcrZ
	}
	switch {
	case given.LcrY <= 0 && given.LcrZ <= 0:
		f.note("in fire the ambient buckling lengths are used: L_fi,y and L_fi,z are not given")
	case given.LcrY <= 0:
		f.note("in fire the ambient buckling length L_cr,y is used: L_fi,y is not given")
	case given.LcrZ <= 0:
		f.note("in fire the ambient buckling length L_cr,z is used: L_fi,z is not given")
	}
	if err := f.hot.Reset(&col, &set); err != nil {
		return err
	}
	f.hot.StandLike(f.member)
	f.hot.Assess(f.candidate, &f.segment)
	return nil
}

func (f *fireAssessment) note(text string) { f.result.Notes = append(f.result.Notes, text) }

// criticalTemperature finds the temperature at which the first of the checks
// in fire reaches its limit.
func (f *fireAssessment) criticalTemperature() {
	r := &f.result
	pulled, pressed := f.extremes()
	switch {
	case !f.hot.AxialOnly:
		// The expressions of 4.2.3.5 for mu_y and mu_z are in circulation in two
		// forms, of which neither could be confirmed.
		r.Reason = "moments act: bending with axial force in fire (EN 1993-1-2, 4.2.3.5) is not covered, " +
			"and the axial force alone would put it too high"
		return
	case pulled == 0 && pressed == 0:
		r.Reason = "no axial force acts"
		return
	}
	r.CriticalTemperature = maxTemperature
	if pulled > 0 && !f.tension() {
		return
	}
	if pressed > 0 {
		f.compression()
	}
}

// extremes returns the greatest tension and compression of any combination in
// fire, N.
func (f *fireAssessment) extremes() (pulled, pressed float64) {
	for i := range f.hot.Forces {
		n, _, _ := f.hot.press(i, f.candidate.Section.Mass)
		pulled = math.Max(pulled, -f.hot.Forces[i].Least)
		pressed = math.Max(pressed, n)
	}
	return pulled * f.result.LoadRatio, pressed * f.result.LoadRatio
}

// tension finds where N_fi,theta,Rd = k_y,theta A fy/gamma_M,fi falls to the
// tension. EN 1993-1-2:2005 4.2.3.1. It reports whether 20 C is survived.
func (f *fireAssessment) tension() bool {
	for i := range f.hot.Forces {
		force := &f.hot.Forces[i]
		if force.Least >= 0 {
			continue
		}
		check := design.Check{Kind: design.Tension, Clause: "EN 1993-1-2, 4.2.3.1", Combination: force.Combination,
			From: force.FromLow, To: force.ToLow, Ed: -force.Least * f.result.LoadRatio, Rd: f.squash()}
		if !f.fall(check, func(theta float64) float64 { return f.squash() * Ky(theta) }) {
			return false
		}
	}
	return true
}

// squash returns A fy/gamma_M,fi, N.
func (f *fireAssessment) squash() float64 { return f.candidate.NplRk() / f.gammaMfi }

// compression finds where the first resistance to buckling falls to its
// action. EN 1993-1-2:2005 4.2.3.2, class 4: 4.2.3.6.
func (f *fireAssessment) compression() {
	f.result.Class = worst(Elements(f.candidate.Section, fireEps*f.candidate.Eps))
	modes := f.modes()
	if f.result.Class == 4 {
		f.class4(modes)
		return
	}
	for i := range modes {
		b := &modes[i]
		check := design.Check{Kind: b.kind, Clause: "EN 1993-1-2, 4.2.3.2", Combination: b.segment.Combination,
			From: b.segment.From, To: b.segment.To, Ed: b.nEd, Rd: f.squash() * b.column.At(20).Chi}
		before := f.result.CriticalTemperature
		if !f.fall(check, func(theta float64) float64 {
			s := b.column.At(theta)
			return f.squash() * s.Chi * s.Ky
		}) {
			return
		}
		if f.result.CriticalTemperature < before {
			f.keep(b)
		}
	}
}

// keep notes the values behind the governing resistance to buckling.
func (f *fireAssessment) keep(b *fireMode) {
	s, r := b.column.At(f.result.CriticalTemperature), &f.result
	r.Lcr, r.How = b.segment.Lcr, b.segment.How()
	r.LambdaBar, r.LambdaTheta = b.column.LambdaBar, s.Lambda
	r.Ky, r.KE, r.Chi = s.Ky, s.KE, s.Chi
}

// fall lowers the critical temperature to the one at which a resistance, N,
// falls to the action of the check, where that is lower. It reports false, and
// says so, where the resistance is short already at 20 C.
func (f *fireAssessment) fall(check design.Check, resistance func(theta float64) float64) bool {
	if check.Ed <= 0 {
		return true
	}
	check.Utilisation = check.Ed / check.Rd
	theta, ok := whereFalls(resistance, check.Ed)
	if !ok {
		f.short(check)
		return false
	}
	if f.result.Governing.Kind == design.KindNone || theta < f.result.CriticalTemperature {
		f.result.CriticalTemperature = math.Min(theta, f.result.CriticalTemperature)
		f.result.Governing = check
	}
	return true
}

// short says that the resistance in fire does not reach the action at 20 C.
func (f *fireAssessment) short(check design.Check) {
	r := &f.result
	check.Utilisation = check.Ed / check.Rd
	r.CriticalTemperature, r.Governing = 0, check
	r.Lcr, r.How, r.LambdaBar, r.LambdaTheta, r.Ky, r.KE, r.Chi = 0, "", 0, 0, 0, 0, 0
	r.Reason = fmt.Sprintf("the resistance in fire is short already at 20 C: %.0f kN against %.0f kN",
		check.Rd/1000, check.Ed/1000)
}

// class4 applies the fixed temperature of EN 1993-1-2:2005 4.2.3.6 to a
// section that the ambient resistance to buckling carries in the fire's
// combination.
func (f *fireAssessment) class4(modes []fireMode) {
	c, r := f.candidate, &f.result
	var most design.Check
	for i := range modes {
		b := &modes[i]
		nbRd := c.resistance(b.ncr, b.curve)
		check := design.Check{Kind: b.kind, Clause: "EN 1993-1-2, 4.2.3.6", Combination: b.segment.Combination,
			From: b.segment.From, To: b.segment.To, Ed: b.nEd, Rd: nbRd, Utilisation: b.nEd / nbRd}
		if exceeds(check.Utilisation, most.Utilisation) {
			most = check
		}
	}
	switch {
	case !Passes(most.Utilisation, 1):
		f.short(most)
	case class4Temperature < r.CriticalTemperature:
		r.CriticalTemperature, r.Governing = class4Temperature, most
		f.note("class 4 in fire: 350 C (EN 1993-1-2, 4.2.3.6)")
	}
}
