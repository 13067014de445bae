package calcsheet

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/ec3"
	"stanchion/design/working"
	"stanchion/schedule"
)

func project() *Project {
	uk, _ := ec3.NationalSet("UK")
	return &Project{Title: "Ottermere Depot", File: "depot.xlsx", Sheet: "Columns", SHA256: strings.Repeat("0f", 32),
		Program: "stanchion test", Standard: "EN 1993-1-1:2005 + A1:2014", National: uk, Settings: [][2]string{{"grade", "S355"}},
		Missing: []Missing{{Column: &design.Column{Mark: "X1", From: "L1"}, Why: "N_Ed is missing"}}}
}

func sheets(t testing.TB) []*working.Sheet {
	var list []*working.Sheet
	for i := range examples {
		list = append(list, sheetOf(t, &examples[i]))
	}
	return list
}

func pdfOf(t testing.TB, list []*working.Sheet) []byte {
	var b bytes.Buffer
	require.NoError(t, PDF(&b, project(), list, Stacks(list, nil, building.Options{})))
	return b.Bytes()
}

// pageTexts returns the text of every page, as another program finds it.
func pageTexts(t *testing.T, pdf []byte) []string {
	tool, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("pdftotext is not installed")
	}
	file := filepath.Join(t.TempDir(), "sheets.pdf")
	require.NoError(t, os.WriteFile(file, pdf, 0o600))
	out, err := exec.Command(tool, "-layout", file, "-").Output()
	require.NoError(t, err)
	return strings.Split(strings.TrimSuffix(string(out), "\f"), "\f")
}

// The same sheets give the same bytes.
func TestPDFIsDeterministic(t *testing.T) {
	list := sheets(t)
	first := pdfOf(t, list)
	for range 3 {
		assert.True(t, bytes.Equal(first, pdfOf(t, list)))
	}
}

// On A3 the same stands in the same places, everything larger by the paper.
func TestPDFOnA3(t *testing.T) {
	list := sheets(t)
	p := project()
	p.Paper = schedule.A3
	var b bytes.Buffer
	require.NoError(t, PDF(&b, p, list, Stacks(list, nil, building.Options{})))
	assert.Equal(t, bytes.Count(pdfOf(t, list), []byte("/Type /Page\n")), bytes.Count(b.Bytes(), []byte("/Type /Page\n")))
	assert.Contains(t, b.String(), "/MediaBox [0 0 841.89 1190.55]")
	// Whole words that stand once: where symbols and numbers are cut apart is the
	// other program's guess.
	whole := regexp.MustCompile(`^[A-Za-z0-9.-]{5,}$`)
	a4, a3 := wordPlaces(t, pdfOf(t, list)), wordPlaces(t, b.Bytes())
	compared := 0
	for word, at := range a4 {
		if len(at) != 1 || len(a3[word]) != 1 || !whole.MatchString(word) {
			continue
		}
		compared++
		for k := range at[0] {
			// Places and sizes of type are printed to a hundredth of a point: of type
			// of 7 pt that is 0.07 % of what stands before a word on its line.
			assert.InDelta(t, at[0][k]*297/210, a3[word][0][k], 0.02+0.0007*a3[word][0][k], word)
		}
	}
	assert.Greater(t, compared, 100)
}

// wordPlaces returns the words of a PDF and where they stand, in points, as
// another program finds them.
func wordPlaces(t *testing.T, pdf []byte) map[string][][4]float64 {
	tool, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("pdftotext is not installed")
	}
	file := filepath.Join(t.TempDir(), "sheets.pdf")
	require.NoError(t, os.WriteFile(file, pdf, 0o600))
	out, err := exec.Command(tool, "-bbox", file, "-").Output()
	require.NoError(t, err)
	words := map[string][][4]float64{}
	for _, m := range regexp.MustCompile(`<word xMin="([^"]+)" yMin="([^"]+)" xMax="([^"]+)" yMax="([^"]+)">([^<]*)`).FindAllStringSubmatch(string(out), -1) {
		var box [4]float64
		for k := range box {
			box[k], err = strconv.ParseFloat(m[k+1], 64)
			require.NoError(t, err)
		}
		words[m[5]] = append(words[m[5]], box)
	}
	return words
}

// A page is found by its text, and says what the results say.
func TestPDFText(t *testing.T) {
	list := sheets(t)
	pages := pageTexts(t, pdfOf(t, list))
	assert.Contains(t, pages[0], "Ottermere Depot")
	assert.Contains(t, pages[0], strings.Repeat("0f", 32))
	assert.Contains(t, pages[0], "X1, L1: NEd is missing" /* set as a symbol */)
	for _, p := range pages {
		assert.Contains(t, p, "to be checked by a qualified engineer")
	}
	for i, s := range list {
		page := ""
		for _, p := range pages {
			if strings.Contains(p, fmt.Sprintf("Sheet %d of %d", i+1, len(list))) {
				page += p
			}
		}
		r := s.Result
		numbers := []string{s.Column.Mark, s.Section.Name(), s.Grade, working.Utilisation(r.Utilisation), r.Status.String()}
		for _, b := range []*design.Buckling{&r.Y, &r.Z, &r.T} {
			if b.Curve != "" {
				numbers = append(numbers, handed(b.Lcr/1e3), handed(b.LambdaBar), handed(b.Chi), handed(b.NbRd/1e3))
			}
		}
		for _, n := range numbers {
			assert.Contains(t, page, n, s.Section.Name())
		}
	}
}

// A sheet is one page, also of Annex A and of class 4 under moments about both
// axes.
func TestOnePageASheet(t *testing.T) {
	for i := range examples {
		e := &examples[i]
		list := []*working.Sheet{sheetOf(t, e)}
		front := 1
		if fit(list[0]).bare {
			front++ // the list of formulas
		}
		got := bytes.Count(pdfOf(t, list), []byte("/Type /Page\n")) - front
		assert.Equal(t, 1, got, e.name)
	}
}

// stack is a column line of three lengths.
func stack(t testing.TB) []*working.Sheet {
	var list []*working.Sheet
	for i, section := range []string{"254x254x73 UKC", "203x203x60 UKC", "203x203x60 UKC"} {
		col := design.Column{Mark: fmt.Sprintf("A1-%d", i+1), Stack: "A1 & <B>", From: fmt.Sprint("L", i), To: fmt.Sprint("L", i+1), Quantity: 1, Length: 4000,
			Combinations: []design.Combination{{NEd: 1500e3 - 500e3*float64(i)}}}
		list = append(list, sheetOf(t, &example{"", section, "S355", col, nil}))
	}
	return list
}

func TestStacks(t *testing.T) {
	list := stack(t)
	list[0], list[2] = list[2], list[0] // the order of the schedule does not count
	stacks := Stacks(list, nil, building.Options{})
	require.Len(t, stacks, 1)
	assert.Equal(t, "A1 & <B>", stacks[0].Name)
	var marks []string
	for _, l := range stacks[0].Lengths {
		marks = append(marks, l.Sheet.Column.Mark)
	}
	assert.Equal(t, []string{"A1-1", "A1-2", "A1-3"}, marks)

	pages := pageTexts(t, pdfOf(t, list))
	assert.Contains(t, pages[1], "Stack A1 & <B>")
	assert.Equal(t, 2, strings.Count(pages[1], "splice"), "nothing says that a length runs through")
}

// Splices are drawn where a take-off counts them.
func TestSplicesAreThoseOfTheRule(t *testing.T) {
	for _, c := range []struct {
		rule           building.Options
		said, splice   bool
		first, between bool // a splice where the section changes; where it stays
	}{
		{building.Options{}, false, false, true, true},
		{building.Options{}, true, false, true, false},
		{building.Options{}, true, true, true, true},
		{building.Options{Splices: building.WhereItPays}, true, true, true, false},
		{building.Options{Splices: building.EveryNth, Every: 2}, false, false, true, true},
		{building.Options{Splices: building.EveryNth, Every: 3}, false, false, true, false},
	} {
		list := stack(t)
		for _, l := range list {
			l.Column.SpliceSaid, l.Column.Splice = c.said, c.splice
		}
		s := Stacks(list, nil, c.rule)[0]
		first, changes := s.spliced(1)
		assert.True(t, changes)
		assert.Equal(t, c.first, first, "%+v", c)
		between, changes := s.spliced(2)
		assert.False(t, changes)
		assert.Equal(t, c.between, between, "%+v", c)
	}
}

func TestSVG(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, Stacks(stack(t), nil, building.Options{})[0].SVG(&b))
	for d := xml.NewDecoder(bytes.NewReader(b.Bytes())); ; {
		_, err := d.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		require.NoError(t, err)
	}
	for _, text := range []string{"L0", "L3", "254x254x73 UKC S355", "splice", "A1 &amp; &lt;B&gt;"} {
		assert.Contains(t, b.String(), text)
	}
}

// What stands in a schedule may be anything.
func TestPDFTakesAnyText(t *testing.T) {
	e := examples[4]
	long := strings.Repeat("Ж漢字😀 _λ̄_,)(__ ", 40)
	e.column.Mark, e.column.Stack, e.column.From, e.column.To = "_", long, "a_", "\x00\u0304"
	e.column.Combinations = slices.Clone(e.column.Combinations)
	e.column.Combinations[0].Name = long
	list := []*working.Sheet{sheetOf(t, &e)}
	p := project()
	p.Title, p.File, p.Settings = long, long, [][2]string{{long, long}}
	var b bytes.Buffer
	require.NoError(t, PDF(&b, p, list, []*Stack{{Name: long, Lengths: []Length{{Sheet: list[0]}}}}))
	require.NoError(t, Text(&b, list[0]))
	require.NoError(t, (&Stack{Name: long, Lengths: []Length{{Sheet: list[0]}}}).SVG(&b))
}

// BenchmarkPDF writes 500 sheets.
func BenchmarkPDF(b *testing.B) {
	var list []*working.Sheet
	for i := range 500 {
		list = append(list, sheetOf(b, &examples[i%len(examples)]))
	}
	size := 0
	for b.Loop() {
		size = len(pdfOf(b, list))
	}
	b.ReportMetric(float64(size)/1e6, "MB")
}
