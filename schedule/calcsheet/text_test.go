package calcsheet

import (
	"bytes"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design/working/formula"
	"stanchion/schedule/internal/golden"
)

func textOf(t *testing.T, e *example) string {
	var b bytes.Buffer
	require.NoError(t, Text(&b, sheetOf(t, e)))
	return b.String()
}

func TestText(t *testing.T) {
	for i := range examples {
		e := &examples[i]
		t.Run(e.name, func(t *testing.T) {
			got := textOf(t, e)
			golden.Equal(t, e.name+".txt", got)
			for _, l := range strings.Split(got, "\n") {
				assert.LessOrEqual(t, columns(l), TextWidth, l)
			}
		})
	}
}

var (
	indented = regexp.MustCompile(`^ {4,}\S`)
	clause   = regexp.MustCompile(`(\S)  +(EN |NCCI |UK |Table |uniform|\(?[0-9]+\.).*`)
	number   = regexp.MustCompile(`^−?[0-9.]+`)
)

// lines joins the lines of a step that is printed over several.
func lines(text string) []string {
	var joined []string
	for _, l := range strings.Split(text, "\n") {
		l = clause.ReplaceAllString(l, "$1")
		if indented.MatchString(l) && len(joined) > 0 {
			joined[len(joined)-1] += " " + strings.TrimSpace(l)
		} else {
			joined = append(joined, strings.TrimSpace(l))
		}
	}
	return joined
}

// Someone with a pocket calculator who works the printed lines out finds the
// printed results, but for one step of the last figure.
func TestTextCanBeFollowed(t *testing.T) {
	for i := range examples {
		e := &examples[i]
		t.Run(e.name, func(t *testing.T) {
			followed := 0
			for _, l := range lines(textOf(t, e)) {
				parts := strings.Split(l, " = ")
				for k := 1; k+1 < len(parts); k++ {
					read, err := formula.Parse(parts[k])
					if err != nil {
						continue
					}
					got, err := formula.Eval(read, nil)
					if err != nil {
						continue // with symbols
					}
					printed := number.FindString(parts[k+1])
					require.NotEmpty(t, printed, l)
					figures := strings.Replace(printed, "−", "-", 1)
					want, err := strconv.ParseFloat(figures, 64)
					require.NoError(t, err)
					step := math.Max(formula.Number{Figures: figures}.Step(), formula.Round(want, 5).Step())
					assert.InDelta(t, want, got, step*1.001, l)
					followed++
				}
			}
			assert.Greater(t, followed, 15)
		})
	}
}
