package summary

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/design"
	"stanchion/schedule"
)

func add(t *Tally, mark string, status design.Status, utilisation float64) {
	m := &schedule.Member{Column: design.Column{Mark: mark, Quantity: 2, Length: 3500}}
	t.Add(m, &design.Result{Status: status, Section: "203x203x46 UKC", Utilisation: utilisation, Mass: 161})
}

func TestTallyKeepsTheWorst(t *testing.T) {
	y := NewTally(3, func(string) string { return "UKC" })
	add(y, "a", design.Fails, 1.2)
	add(y, "b", design.NoSection, 3)
	add(y, "c", design.Passes, 0.9)
	add(y, "d", design.Fails, math.Inf(1))
	add(y, "e", design.Fails, 1.2)
	add(y, "f", design.Fails, 1.1)
	add(y, "g", design.NotRead, 0)
	var marks []string
	for _, l := range y.Worst {
		marks = append(marks, l.Member.Column.Mark)
	}
	assert.Equal(t, []string{"d", "b", "a"}, marks)
	assert.Equal(t, [4]int{1, 4, 1, 1}, y.Count)
	assert.Equal(t, 7, y.Members())
}

func TestTallyJoinsEqualReasons(t *testing.T) {
	y := NewTally(2, func(string) string { return "" })
	for _, c := range [][2]string{{"A1", "no section"}, {"A2", "too long"}, {"A3", "no section"}, {"A4", "too short"}} {
		m := &schedule.Member{Column: design.Column{Cell: c[0]}}
		y.Add(m, &design.Result{Status: design.NotRead, Notes: []string{c[1]}})
	}
	m := &schedule.Member{Problems: []*schedule.Problem{{Cell: "B5", What: "too long"}, {Cell: "C5", What: "N_Ed"}}}
	y.Add(m, &design.Result{Status: design.NotRead})
	assert.Equal(t, []Reason{{"A1", "no section", 2}, {"A2", "too long", 2}}, y.NotRead)
	assert.Equal(t, 2, y.Unlisted)
}

func TestTallyCountsSteelThatIsBought(t *testing.T) {
	y := NewTally(3, func(string) string { return "UKC" })
	add(y, "a", design.Passes, 0.9)
	add(y, "b", design.Fails, 1.9)
	add(y, "c", design.NoSection, 3) // the best tried is not bought
	add(y, "d", design.NotRead, 0)
	assert.Equal(t, []Steel{{"UKC", 4, 14, 644}}, y.Steel())
	assert.Equal(t, Steel{"all", 4, 14, 644}, Total(y.Steel()))
}

func TestLevel(t *testing.T) {
	assert.Equal(t, "L1-L2", Level(&design.Column{From: "L1", To: "L2"}))
	assert.Equal(t, "L1", Level(&design.Column{From: "L1"}))
}
