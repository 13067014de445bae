package workbook

import "slices"

// paging finds where printed pages must begin so that what belongs together is
// not cut by the end of one.
type paging struct {
	*Sheet
	room     float64 // of a page, in points
	repeated float64 // height of the rows that open every page
	page     int     // the row that begins the last page
	breaks   []int
}

// pageBreaks returns the rows, from 1, that begin a printed page so that
// chapters and tables which fit on a page are not cut by its end.
func (s *Sheet) pageBreaks() []int {
	p := &paging{Sheet: s, room: s.room(), repeated: s.high(1, s.RepeatRows+1), page: 1}
	end := len(s.Rows) + 1
	if len(s.Chapters) == 0 {
		p.tables(s.Tables, end)
		return p.breaks
	}
	for i, from := range s.Chapters {
		p.chapter(from, next(s.Chapters, i, end))
	}
	return p.breaks
}

// next returns where the i-th stretch ends: with the next one, or with them
// all.
func next(starts []int, i, end int) int {
	if i+1 < len(starts) {
		return starts[i+1]
	}
	return end
}

// room returns the height of the rows that stand on a printed page, in points.
func (s *Sheet) room() float64 {
	across, down := s.page()
	room := down * 72
	if s.PagesWide > 0 {
		width, _ := s.width()
		room /= min(1, float64(s.pagesWide())*across*characters/width)
	}
	return room
}

// chapter begins a page with a chapter that finds no room on the last one,
// unless that has hardly begun, and keeps its tables whole.
func (p *paging) chapter(from, end int) {
	if p.fits(p.page, end) {
		return
	}
	const hardly = 1.0 / 8
	if p.fits(from, end) || p.high(p.page, from) > hardly*p.room {
		p.turn(from)
	}
	first, _ := slices.BinarySearch(p.Tables, from+1)
	last, _ := slices.BinarySearch(p.Tables, end)
	p.tables(append([]int{from}, p.Tables[first:last]...), end)
}

// tables keeps tables whole.
func (p *paging) tables(starts []int, last int) {
	for i, from := range starts {
		end := next(starts, i, last)
		if p.fits(p.page, end) {
			continue
		}
		if from > p.page && p.fits(from, end) {
			p.turn(from)
			continue
		}
		for r := p.page; r < end; r++ { // it runs over
			if !p.fits(p.page, r+1) {
				p.page = r
			}
		}
	}
}

// turn begins a page with a row.
func (p *paging) turn(row int) {
	if row > p.page {
		p.breaks = append(p.breaks, row)
		p.page = row
	}
}

// fits reports whether rows, the last left out, stand on one page.
func (p *paging) fits(from, end int) bool {
	h := p.high(from, end)
	if from > p.RepeatRows {
		h += p.repeated
	}
	return h <= p.room
}

// high returns the height of rows, the last left out, in points.
func (s *Sheet) high(from, end int) float64 {
	h := 0.0
	for r := from; r < end; r++ {
		if x := s.Heights[r]; x > 0 {
			h += x
		} else {
			h += usualRowHeight
		}
	}
	return h
}
