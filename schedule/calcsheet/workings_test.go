package calcsheet

import (
	"cmp"
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule/internal/golden"
	"stanchion/schedule/workbook"
)

func workingsOf(t testing.TB) *Workings {
	t.Helper()
	return NewWorkings("It's working", &Project{File: "loads.xlsx", Sheet: "Columns", Standard: "EN 1993-1-1", National: design.National{Name: "UK"}})
}

// shown returns a cell as a person sees it: subscripts behind a _, and what is
// slanted as it is.
func shown(c *workbook.Cell) string {
	switch v := c.Value.(type) {
	case nil:
		return ""
	case float64:
		return strings.Replace(fmt.Sprintf("%.*f", decimals(c.Look.Format), v), "-", "−", 1)
	case workbook.Rich:
		s := ""
		for _, run := range v {
			if run.Subscript {
				s += "_"
			}
			s += run.Text
		}
		return s
	}
	return fmt.Sprint(c.Value)
}

// shownRows returns the rows behind the headings.
func shownRows(s *workbook.Sheet) (rows [][]string) {
	for _, row := range s.Rows[s.FreezeRows:] {
		texts := make([]string, workingColumns)
		for i := range row {
			texts[i] = shown(&row[i])
		}
		rows = append(rows, texts)
	}
	return rows
}

func TestWorkings(t *testing.T) {
	for i := range examples {
		e := &examples[i]
		t.Run(e.name, func(t *testing.T) {
			w := workingsOf(t)
			w.Add(sheetOf(t, e))
			sheet := w.Sheet()
			var b strings.Builder
			for _, row := range shownRows(&sheet) {
				fmt.Fprintln(&b, strings.TrimRight(strings.Join(row, " | "), " |"))
			}
			golden.Equal(t, e.name+".cells.txt", b.String())
		})
	}
}

// BenchmarkWorkings writes the working of one more member.
func BenchmarkWorkings(b *testing.B) {
	s := sheetOf(b, &examples[4])
	w := workingsOf(b)
	b.ReportAllocs()
	for b.Loop() {
		if w.Add(s) == "" {
			w = workingsOf(b)
		}
	}
}

// isTable reports whether a row is one of a table of buckling lengths or
// moments.
func isTable(row []string) bool {
	switch row[symbolColumn] {
	case "y-y", "z-z", "u-u", "v-v", "torsion", "axis", "combination", "ULS1", "ULS2":
		return true
	}
	return false
}

// oneBlank returns a text with single blanks between its words.
func oneBlank(s string) string { return strings.Join(strings.Fields(s), " ") }

// Every line with a value stands in the printed working too, with the same
// numbers, value and unit, and there are as many as the working has.
func TestWorkingsAreThePrintedOnes(t *testing.T) {
	for i := range examples {
		e := &examples[i]
		t.Run(e.name, func(t *testing.T) {
			s, w := sheetOf(t, e), workingsOf(t)
			text := oneBlank(clause.ReplaceAllString(strings.Join(lines(textOf(t, e)), "\n"), "$1"))
			w.Add(s)
			sheet := w.Sheet()
			found := 0
			for _, row := range shownRows(&sheet)[1:] { // behind the heading
				if row[symbolColumn] == "All checks" {
					break
				}
				if row[valueColumn] == "" || isTable(row) {
					continue
				}
				left := cmp.Or(row[numbersColumn], row[formulaColumn], row[symbolColumn])
				unit := " " + row[unitColumn]
				if strings.HasPrefix(row[unitColumn], "×") {
					unit = unit[1:]
				}
				line := oneBlank(left + " = " + row[valueColumn] + unit)
				assert.True(t, strings.Contains(text, line), line)
				found++
			}
			assert.Equal(t, countOf(s), found)
		})
	}
}

// countOf counts what a working has a value of.
func countOf(s *working.Sheet) (n int) {
	for _, b := range s.Blocks {
		for _, item := range b.Items {
			switch item := item.(type) {
			case working.Values:
				n += len(item)
			case *working.Step:
				n++
			}
		}
	}
	return n
}

func TestPlacesOfWorkings(t *testing.T) {
	w := workingsOf(t)
	for i := range examples {
		e := examples[i]
		e.column.Cell = fmt.Sprintf("Columns!B%d", 10+i)
		place := w.Add(sheetOf(t, &e))
		require.True(t, strings.HasPrefix(place, "'It''s working'!A"), place)
		var row int
		fmt.Sscanf(place[len("'It''s working'!A"):], "%d", &row)
		head := w.page.Rows[row-1][symbolColumn]
		assert.Contains(t, head.Value, e.column.Mark)
		assert.Equal(t, fmt.Sprintf("'Columns'!B%d", 10+i), head.Link)
	}
}

// A printed page can begin with every member, and with every subject but the
// first.
func TestPartsOfWorkings(t *testing.T) {
	w := workingsOf(t)
	for i := range examples {
		s := sheetOf(t, &examples[i])
		tables := len(w.page.Tables)
		w.Add(s)
		assert.Contains(t, w.page.Rows[w.page.Chapters[i]-1][0].Value, examples[i].column.Mark)
		var titles, want []string
		for _, row := range w.page.Tables[tables:] {
			titles = append(titles, w.page.Rows[row-1][0].Value.(string))
		}
		for _, b := range s.Blocks[1:] {
			want = append(want, b.Title)
		}
		assert.Equal(t, append(want, "All checks"), titles)
	}
}

func TestFullSheetOfWorkings(t *testing.T) {
	w := workingsOf(t)
	w.page.Rows = append(w.page.Rows, make([][]workbook.Cell, maxRows-len(w.page.Rows)-50)...)
	rows, merges := len(w.page.Rows), len(w.page.Merges)
	assert.Empty(t, w.Add(sheetOf(t, &examples[0])))
	assert.Len(t, w.page.Rows, rows)
	assert.Len(t, w.page.Merges, merges)
	assert.Empty(t, w.page.Chapters)
	sheet := w.Sheet()
	assert.LessOrEqual(t, len(sheet.Rows), maxRows)
}

func TestTextsWithSymbols(t *testing.T) {
	for _, text := range []string{"N_cr,TF is the least root N of (N − N_cr,u)(N − N_cr,v)(N − N_cr,T) − N² (u_0/i_0)² (N − N_cr,v)", "λ̄_0 is not above", "no symbol at all", "λ̄ ≤ 0.2, 6.3.1.2", ""} {
		c := workbook.Cell{Value: richText(text)}
		assert.Equal(t, text, shown(&c))
	}
	assert.Equal(t, workbook.Rich{{Text: "L", Letter: true}, {Text: "cr", Subscript: true}, {Text: " mm"}}, richText("L_cr mm"))
}
