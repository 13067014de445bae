package revision

import (
	"fmt"
	"math"
	"strings"

	"stanchion/schedule"
	"stanchion/schedule/takeoff"
)

// Facts are what there is to say of the comparison as a whole, as pairs of a
// name and a value.
func (c *Comparison) Facts() [][2]string {
	var list [][2]string
	add := func(name, format string, args ...any) {
		list = append(list, [2]string{name, fmt.Sprintf(format, args...)})
	}
	word := func(w string) int { return c.count(func(r *Row) bool { return r.Word() == w }) }
	add("members", "%d in both issues, %d new, %d gone", len(c.Pairs), len(c.Added), len(c.Removed))
	add("of those in both", "%d changed, %d the same", word(wordChanged), word(wordSame))
	if n := c.count(func(r *Row) bool { return !r.New.Readable() }); n > 0 {
		add("not read", "%d of the new issue", n)
	}
	if s := c.kinds(); s != "" {
		add("what changed", "%s", s)
	}
	if s := c.extremes(); s != "" {
		add("axial force", "%s", s)
	}
	add("sections of the old issue", "%s", c.verdicts())
	if c.Old.sized() {
		add("note", "%s gives no sections: its members are held in the lightest for their own actions", c.Old.File)
	}
	if n := len(c.Candidates); n > 0 {
		pairs := fmt.Sprintf("%d pairs", n)
		if n == 1 {
			pairs = "1 pair"
		}
		add("perhaps the same", "%s of a gone and a new member, listed with the changes: where they are, say so with --renamed \"OLD=NEW\", named as there", pairs)
	}
	if len(c.Ignored) > 0 {
		add("told apart without", "%s, which only one issue has", strings.Join(c.Ignored, " and "))
	}
	return list
}

func (c *Comparison) count(is func(*Row) bool) (n int) {
	for i := range c.Rows {
		if is(&c.Rows[i]) {
			n++
		}
	}
	return n
}

// sized reports whether the members were sized for the comparison.
func (i *Issue) sized() bool {
	for k := range i.Members {
		if i.Members[k].Sized {
			return true
		}
	}
	return false
}

// kinds counts the members by what changed.
func (c *Comparison) kinds() string {
	var parts []string
	for k := Load; k <= Steel; k++ {
		if n := c.count(func(r *Row) bool { return Has(r.Changes, k) }); n > 0 {
			parts = append(parts, fmt.Sprintf("%s of %d", k, n))
		}
	}
	return strings.Join(parts, ", ")
}

// extremes names the members whose greatest axial force grew and fell most.
func (c *Comparison) extremes() string {
	most, least := -1, -1
	for i := range c.Rows {
		x := c.Rows[i].rise()
		if math.IsNaN(x) {
			continue
		}
		if x > 0 && (most < 0 || x > c.Rows[most].rise()) {
			most = i
		}
		if x < 0 && (least < 0 || x < c.Rows[least].rise()) {
			least = i
		}
	}
	var parts []string
	for _, e := range []struct {
		word string
		i    int
	}{{"grew most", most}, {"fell most", least}} {
		if e.i >= 0 {
			parts = append(parts, fmt.Sprintf("%s in %s, by %.1f %%", e.word, c.Rows[e.i].New.Name(), math.Abs(c.Rows[e.i].rise())))
		}
	}
	return strings.Join(parts, "; ")
}

func (c *Comparison) verdicts() string {
	s := fmt.Sprintf("%d stay, %d fail, %d could be lighter", c.Count(Stays), c.Count(Weak), c.Count(Spare))
	if c.Count(Spare) > 0 {
		s += fmt.Sprintf(" (%.3f t)", float64(c.Saving())/1e6)
	}
	if n := c.Count(Barred); n > 0 {
		s += fmt.Sprintf(", %d not allowed any more", n)
	}
	if n := c.count(func(r *Row) bool { return r.Old != nil && r.Verdict == NotChecked }); n > 0 {
		s += fmt.Sprintf(", %d not checked", n)
	}
	return s
}

// Saving is the steel, g, that lighter sections would save in place of old ones
// that pass.
func (c *Comparison) Saving() (grams int64) {
	for i := range c.Rows {
		grams += c.Rows[i].Saving
	}
	return grams
}

// Tonnage is the steel of one way to build.
type Tonnage struct {
	Name    string
	Steel   *takeoff.TakeOff
	Without int // members that are not counted: they have no section
}

// Tonnages are the steel before and after: with the sections that the new issue
// gives, if it does for most, with those that can stay, and with the lightest.
func (c *Comparison) Tonnages() []Tonnage {
	list := []Tonnage{{Name: "old issue", Steel: &c.Before}}
	if len(c.Issued.LeftOut) < len(c.Rows)/2 {
		list = append(list, Tonnage{Name: "new issue, as it stands", Steel: &c.Issued})
	}
	list = append(list, Tonnage{Name: "new issue, sections stay where they pass", Steel: &c.Staying},
		Tonnage{Name: "new issue, all sized anew", Steel: &c.Light})
	for i := range list {
		list[i].Without = len(list[i].Steel.LeftOut)
	}
	return list
}

// SettingsThatDiffer compares the settings of two issues.
func SettingsThatDiffer(old, new *schedule.Settings) []Change {
	before := map[string]string{}
	for _, s := range old.Used() {
		before[s.Name] = s.Value
	}
	var list []Change
	for _, s := range new.Used() {
		if v, ok := before[s.Name]; !strings.HasPrefix(s.Name, "map ") && !s.Layout() && (!ok && s.Value != "" || ok && v != s.Value) {
			list = append(list, Change{Text: fmt.Sprintf("%s %s → %s", s.Name, orWord(v), orWord(s.Value))})
		}
	}
	return list
}

func orWord(s string) string {
	if s == "" {
		return "none"
	}
	return s
}
