package ec3

import (
	"strconv"

	"stanchion/design"
)

// note says what a person must know of how the row was taken.
func (m *Member) note() {
	for _, text := range []string{m.y.Note(), m.z.Note()} {
		if text != "" {
			m.Notes = append(m.Notes, text)
		}
	}
	t := &m.Column.Torsion
	if t.LT > 0 && len(t.Restraints) > 0 {
		m.Notes = append(m.Notes, "L_T is given: the torsion restraints do not count")
	}
	if m.Eccentric() {
		m.Notes = append(m.Notes, "z-z is held off the shear centre: between torsion restraints an open section turns "+
			"about the line that holds it (Timoshenko and Gere, art. 5.7); that line is taken as held all along, and held at points N_cr can be up to 7 % lower")
	}
	if m.reactionsLeftOut() {
		m.Notes = append(m.Notes, "beam reactions are given and do not count: the setting moments is analysis, and nominal moments need simple")
	}
	tension, zero := -1, true
	for i := range m.Forces {
		f := &m.Forces[i]
		if f.Least < 0 && tension < 0 {
			tension = i
		}
		zero = zero && f.Least == 0 && f.Greatest == 0
	}
	if tension >= 0 {
		m.Notes = append(m.Notes, "N_Ed is tension"+m.in(tension)+
			": yielding of the gross section is checked (6.2.3), the net section at holes is not")
	}
	if zero {
		m.Notes = append(m.Notes, "N_Ed is 0")
	}
}

// reactionsLeftOut reports whether beam reactions bend the member that the
// settings do not ask for.
func (m *Member) reactionsLeftOut() bool {
	if m.Settings.Moments == design.MomentsSimple {
		return false
	}
	for i := range m.Column.Combinations {
		if c := &m.Column.Combinations[i]; c.FlangeA != 0 || c.FlangeB != 0 || c.WebA != 0 || c.WebB != 0 {
			return true
		}
	}
	return false
}

// Notes says what a person must know of how the checks were chosen in the
// candidate: where (6.61) and (6.62) stand in the place of the criterion of
// simple construction, and why; where C1 is not the table's; where a given
// length does not go with the moments. A rule that does not cover the member is
// a check of its own, with the reason.
func (a *Assessment) Notes() []string {
	var notes []string
	if a.Lateral.beyond() || a.Interaction.LT.beyond() || a.Simple.LT.beyond() {
		notes = append(notes, "an end is free to twist: C1 is taken lower than NCCI SN003's, which is for lengths held against twist at both ends")
	}
	if a.Interaction.Class > 0 || a.Lateral.Class > 0 || a.Simple.Class > 0 {
		if text := a.shortened(); text != "" {
			notes = append(notes, text)
		}
	}
	for i := range a.scopes {
		reason := a.scopes[i].reason
		if reason == "" {
			continue
		}
		notes = append(notes, reason+a.Member.in(i)+": (6.61) and (6.62) are checked instead")
	}
	return notes
}

// in says in which combination, where there are several.
func (m *Member) in(index int) string {
	if len(m.Column.Combinations) == 1 {
		return ""
	}
	return " in " + m.combination(index)
}

// combination names a combination for people.
func (m *Member) combination(index int) string {
	if name := m.Column.Combinations[index].Name; name != "" {
		return name
	}
	return "combination " + strconv.Itoa(index+1)
}
