package workbook

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/schedule"
)

// widePage is a page of columns of 20 characters, the first of which is frozen.
func widePage(columns int) *Page {
	widths := make([]float64, columns)
	for i := range widths {
		widths[i] = 20
	}
	p := NewPage("Wide", "Wide", widths...)
	p.FreezeCols, p.RepeatRows, p.Landscape = 1, 1, true
	return p
}

func TestAWidePageIsPrintedOverSeveral(t *testing.T) {
	// A4 landscape holds (297 - 2 x 10.16) mm / 25.4 x 96/7 = 149.4 characters,
	// 249 at six tenths: twelve columns; A3, 216 and 359: seventeen.
	for _, c := range []struct {
		columns    int
		paper      schedule.Paper
		pages      int
		wantTitles string
	}{
		{12, schedule.A4, 1, "$1:$1"},
		{13, schedule.A4, 2, "$A:$A,$1:$1"},
		{17, schedule.A3, 1, "$1:$1"},
		{18, schedule.A3, 2, "$A:$A,$1:$1"},
		{40, schedule.A4, 4, "$A:$A,$1:$1"}, // 20 + 39 x 20: 229 of each page are not the marks
	} {
		s := &Laid([]Sheet{widePage(c.columns).Sheet}, c.paper)[0]
		assert.Equal(t, c.pages, s.pagesWide(), "%d columns", c.columns)
		assert.Equal(t, c.wantTitles, s.printTitles(""), "%d columns", c.columns)
	}
	loose := widePage(40).Sheet
	loose.FreezeCols = 0
	assert.Equal(t, 1, loose.pagesWide(), "nothing would tell of which row a page is")
	loose.RepeatFrom, loose.RepeatRows = 3, 4
	assert.Equal(t, "$3:$4", loose.printTitles(""), "headings below a picture")
	asItComes := widePage(40).Sheet
	asItComes.PagesWide = 0
	assert.Zero(t, asItComes.pagesWide())
}

func TestTablesAreKeptOnAPage(t *testing.T) {
	table := func(p *Page, rows int) {
		p.Begin()
		for range rows {
			p.Row(TextCell("x"))
		}
	}
	p := NewPage("Tables", "Tables", 20, 20) // no wider than the paper, so printed as large as it is
	// A4 portrait holds (297/25.4 - 1.1) x 72/15 = 50 rows of 15 points.
	table(p, 30)
	table(p, 19)
	assert.Empty(t, p.pageBreaks(), "1 + 30 + 19 rows fill the page")
	table(p, 1)
	assert.Equal(t, []int{51}, p.pageBreaks())
	table(p, 60)
	assert.Equal(t, []int{51}, p.pageBreaks(), "what no page holds begins where it may")
	table(p, 45)
	assert.Equal(t, []int{51, 112}, p.pageBreaks(), "60 rows from the second of a page leave 39 for the next")
	p.Heights = map[int]float64{3: 1000}
	assert.NotEqual(t, []int{51, 112}, p.pageBreaks(), "rows are as high as they are said to be")
}

func TestChaptersAreKeptOnAPage(t *testing.T) {
	chapter := func(p *Page, tables ...int) {
		p.Chapter()
		for i, rows := range tables {
			if i > 0 {
				p.Begin()
			}
			for range rows {
				p.Row(TextCell("x"))
			}
		}
	}
	p := NewPage("Chapters", "Chapters", 20, 20)
	p.Freeze() // one row, on every page: 49 are left of 50
	chapter(p, 40)
	chapter(p, 9)
	assert.Empty(t, p.pageBreaks(), "the page is full")
	chapter(p, 20, 20)
	assert.Equal(t, []int{51}, p.pageBreaks())
	chapter(p, 6, 4)
	assert.Equal(t, []int{51, 91}, p.pageBreaks(), "nine rows are left: it is not split between its tables")
	chapter(p, 30, 30)
	assert.Equal(t, []int{51, 91, 101, 131}, p.pageBreaks(), "no page holds it: it begins one, and is split between its tables")

	long := NewPage("Long", "Long", 20, 20)
	long.Freeze()
	chapter(long, 60, 10)
	assert.Empty(t, long.pageBreaks(), "the page has hardly begun: the sixty go on to the next, which holds the ten too")
}
