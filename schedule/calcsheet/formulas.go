package calcsheet

import (
	"stanchion/design/working"
	"stanchion/design/working/formula"
)

// formulaList is the title of the pages that the bare sheets refer to.
const formulaList = "Formulas"

// formulas lists the formulas of sheets that have no room for them, once each:
// the fullest sheets show the numbers alone.
func (d *document) formulas(sheets []*working.Sheet, how []dense) {
	var blocks []working.Block
	seen := map[string]bool{}
	for i, s := range sheets {
		if how[i].bare {
			blocks = gather(blocks, s, seen)
		}
	}
	if len(blocks) == 0 {
		return
	}
	set := newSetter()
	set.width = columnWidth / (7 * pt)
	var lines []line
	for i := range blocks {
		lines = append(lines, set.block(&blocks[i])...)
	}
	for len(lines) > 0 {
		d.page(formulaList)
		y := marginTop + titleHeight + 5
		write(d.canvas, marginLeft, y, "Formulas of the sheets that show numbers alone", bold, 11*pt, atLeft)
		for column := range 2 {
			n := fitting(lines, (bodyBottom-y-2)/(7*pt), 0.2)
			d.column(lines[:n], marginLeft+float64(column)*(columnWidth+columnGap), y+2, 7*pt, 0.2)
			lines = lines[n:]
		}
	}
}

// gather adds the formulas of a sheet that were not seen, under the titles of
// their blocks.
func gather(blocks []working.Block, s *working.Sheet, seen map[string]bool) []working.Block {
	for i := range s.Blocks {
		b := &s.Blocks[i]
		for _, item := range b.Items {
			step, ok := item.(*working.Step)
			if !ok || step.Formula == nil || step.Numbers == nil {
				continue
			}
			key := b.Title + formula.Text(step.Left) + formula.Text(step.Formula)
			if seen[key] {
				continue
			}
			seen[key] = true
			at := -1
			for k := range blocks {
				if blocks[k].Title == b.Title {
					at = k
				}
			}
			if at < 0 {
				blocks = append(blocks, working.Block{Title: b.Title})
				at = len(blocks) - 1
			}
			blocks[at].Items = append(blocks[at].Items, &working.Step{Left: step.Left, Formula: step.Formula, Clause: step.Clause})
		}
	}
	return blocks
}
