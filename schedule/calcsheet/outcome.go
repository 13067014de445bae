package calcsheet

import (
	"fmt"
	"slices"
	"strings"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/design/working/formula"
	"stanchion/schedule"
)

// caution stands on every sheet.
const caution = "Results are design aids, to be checked by a qualified engineer against the project's own requirements, " +
	"the national annex and local regulations. Not covered: built-up and tapered members, seismic, fatigue, connections, " +
	"base plates, second-order frame effects (the forces given must include them where they matter)."

// verdict says in one line how a column came out.
func verdict(s *working.Sheet) string {
	text := s.Result.Status.String() + ": utilisation " + working.Utilisation(s.Result.Utilisation) +
		" against " + fmt.Sprintf("%.2f", s.Limit)
	if s.Governing >= 0 {
		g := &s.Checks[s.Governing]
		text += ", " + schedule.CheckName(g.Kind) + " governs (" + g.Clause + ")"
	}
	return text
}

// checkTable lists checks.
func checkTable(s *working.Sheet, checks []design.Check, governing int) working.Table {
	t := working.Table{
		Head:  []string{"clause", "check", "segment m", "combination", "E_d", "R_d", "", "E_d/R_d", ""},
		Right: []bool{false, false, false, false, true, true, false, true, false},
	}
	for i := range checks {
		c := &checks[i]
		ed, rd, unit := amounts(c)
		mark := ""
		if i == governing {
			mark = "governs"
		}
		t.Rows = append(t.Rows, []string{c.Clause, schedule.CheckName(c.Kind), segment(c.From, c.To), combination(s.Column, c.Combination),
			ed, rd, unit, working.Utilisation(c.Utilisation), mark})
	}
	return t
}

// amounts writes the two sides of a check with their unit, kN or kNm; nothing
// where the criterion is a sum.
func amounts(c *design.Check) (ed, rd, unit string) {
	if c.Rd == 0 {
		return "", "", ""
	}
	scale, unit := 1e3, "kN"
	switch c.Kind {
	case design.BendingY, design.BendingZ, design.LateralTorsional:
		scale, unit = 1e6, "kNm"
	}
	return fmt.Sprintf("%.1f", c.Ed/scale), fmt.Sprintf("%.1f", c.Rd/scale), unit
}

// segment writes the heights of a segment in m.
func segment(from, to float64) string {
	if to <= from {
		return metres(from) // a cross-section
	}
	return metres(from) + "-" + metres(to)
}

func metres(mm float64) string {
	s := formula.Figures(mm/1000, 12)
	if !strings.Contains(s, ".") {
		s += ".0"
	}
	return s
}

func combination(c *design.Column, i int) string {
	switch {
	case i < 0 || i >= len(c.Combinations):
		return ""
	case c.Combinations[i].Name == "" && len(c.Combinations) > 1:
		return fmt.Sprint(i + 1)
	}
	return working.Short(c.Combinations[i].Name)
}

// figures says how exact the numbers of a working are.
const figures = "Numbers stand to as many figures as those before them support: worked out with the printed numbers, " +
	"a line gives the printed result, but for one step of its last figure."

// closing is what stands below the checks: what is known beyond them, and the
// caution.
func closing(s *working.Sheet) []string { return append(beyond(s), figures, caution) }

// beyond is what is known beyond the checks: the rules that do not cover the
// section, mass, the reserve, the next lighter section, what was noted of the
// column.
func beyond(s *working.Sheet) []string {
	r := s.Result
	var lines []string
	for i := range s.Checks {
		if c := &s.Checks[i]; c.Kind == design.Refused {
			lines = append(lines, fmt.Sprintf("Outside the rules (%s): %s.", c.Clause, c.Reason))
		}
	}
	lines = append(lines, fmt.Sprintf("Mass: %s kg/m × %s m = %.1f kg a piece.", formula.Figures(s.Section.Mass, 5), metres(s.Column.Length), r.Mass))
	if r.Reserve > 0 {
		lines = append(lines, fmt.Sprintf("Reserve: every axial force may grow by the factor %.3f (%s gives way first).", r.Reserve, schedule.CheckName(r.ReserveCheck)))
	}
	if r.NextLighter != "" {
		lines = append(lines, fmt.Sprintf("Next lighter: %s %s, utilisation %s in %s.", r.NextLighter, r.NextLighterGrade,
			working.Utilisation(r.NextLighterUtilisation), schedule.CheckName(r.NextLighterCheck.Kind)))
	}
	for _, n := range told(s) {
		lines = append(lines, "Note: "+n+".")
	}
	return lines
}

// told is what the choice of the section and the reading of the row have to
// say, beside the notes of the working itself: without it nobody sees why a
// column has the section of the one below.
func told(s *working.Sheet) []string {
	var out []string
	for _, n := range slices.Concat(s.Result.Notes, s.Column.Notes) {
		if !slices.Contains(s.Notes, n) && !slices.Contains(out, n) {
			out = append(out, n)
		}
	}
	return out
}
