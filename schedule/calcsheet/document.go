package calcsheet

import (
	"fmt"
	"io"
	"runtime"
	"strings"
	"time"

	"codeberg.org/go-pdf/fpdf"
	"golang.org/x/sync/errgroup"

	"stanchion/design/working"
	"stanchion/design/working/formula"
	"stanchion/schedule"
)

// PDFTitle opens the title of every PDF that this package writes.
const PDFTitle = "Column calculations"

// PDF writes the calculation sheets of a project: what was used, a list of the
// sheets, the elevations of the stacks, and a sheet for every member. The same
// input gives the same bytes.
func PDF(w io.Writer, p *Project, sheets []*working.Sheet, stacks []*Stack) error {
	d := newDocument(p, len(sheets))
	how := fitAll(sheets)
	d.contents(sheets)
	d.formulas(sheets, how)
	d.stackPages(stacks)
	for i, s := range sheets {
		d.memberPages(s, how[i], i+1, len(sheets))
	}
	return d.pdf.Output(w)
}

// fitAll finds the density of every sheet, on all processors.
func fitAll(sheets []*working.Sheet) []dense {
	how := make([]dense, len(sheets))
	var g errgroup.Group
	g.SetLimit(runtime.GOMAXPROCS(0))
	for i, s := range sheets {
		g.Go(func() error {
			how[i] = fit(s)
			return nil
		})
	}
	g.Wait()
	return how
}

// document is a PDF that is being drawn.
type document struct {
	pdf     *fpdf.Fpdf
	canvas  *pdfCanvas
	project *Project
	pages   int
}

// pagesAlias stands for the number of pages until that is known.
const pagesAlias = "{nb}"

// Pages are drawn in the measures of A4. On A3 they are as many and hold the
// same, everything larger.
const a3Scale = 297.0 / 210

func newDocument(p *Project, sheets int) *document {
	paper, scale := "A4", 1.0
	if p.Paper == schedule.A3 {
		paper, scale = "A3", a3Scale
	}
	pdf := fpdf.New("P", "mm", paper, "")
	pdf.SetAutoPageBreak(false, 0)
	pdf.SetMargins(0, 0, 0)
	// Nothing in the file tells when it was made.
	epoch := time.Unix(0, 0).UTC()
	pdf.SetCreationDate(epoch)
	pdf.SetModificationDate(epoch)
	pdf.SetCatalogSort(true)
	pdf.SetCompression(true)
	pdf.SetTitle(printable(PDFTitle+": "+p.title()), true)
	pdf.SetSubject(p.Standard, true)
	pdf.SetCreator(p.Program, true)
	pdf.SetProducer(p.Program, true)
	pdf.AliasNbPages(pagesAlias)
	d := &document{pdf: pdf, canvas: newPDFCanvas(pdf, scale), project: p}
	for range sheets {
		d.canvas.links = append(d.canvas.links, pdf.AddLink())
	}
	return d
}

// page starts a page with its title block and caution.
func (d *document) page(sheet string) {
	d.canvas.page()
	d.pages++
	d.titleBlock(sheet)
	d.caution()
}

// titleBlock says what the page belongs to, and leaves room for the hands that
// made and checked it.
func (d *document) titleBlock(sheet string) {
	c, p := d.canvas, d.project
	const x, y, h = marginLeft, marginTop, titleHeight - 3
	frame(c, x, y, textWidth, h, usualLine)
	columns := []float64{94, 116, 138, 157}
	for _, at := range columns {
		c.line(x+at, y, x+at, y+h, thinLine)
	}
	write(c, x+2, y+4.3, cut(p.title(), bold, 88/(10*pt)), bold, 10*pt, atLeft)
	write(c, x+2, y+7.3, cut("Steel columns, "+p.Standard+", national set "+p.National.Name, upright, 90/(6.4*pt)), upright, 6.4*pt, atLeft)
	from := p.File
	if p.Sheet != "" {
		from += ", sheet " + p.Sheet
	}
	write(c, x+2, y+10, cut(from, upright, 90/(6.4*pt)), upright, 6.4*pt, atLeft)
	for i, label := range []string{"Made by", "Checked by", "Date"} {
		write(c, x+columns[i]+1, y+2.6, label, upright, 5.4*pt, atLeft)
	}
	write(c, x+columns[3]+1.5, y+5, sheet, bold, 8*pt, atLeft)
	write(c, x+columns[3]+1.5, y+9.4, fmt.Sprintf("page %d of %s", d.pages, pagesAlias), upright, 6.4*pt, atLeft)
}

// caution stands at the foot of every page.
func (d *document) caution() {
	const size = 5.2 * pt
	y := pageHeight - marginBottom - footHeight + 3.4
	d.canvas.line(marginLeft, y-2.6, pageWidth-marginRight, y-2.6, thinLine)
	at := ""
	for _, word := range strings.Fields(caution + " Made with " + d.project.Program + ".") {
		if upright.width(at+" "+word)*size > textWidth {
			write(d.canvas, marginLeft, y, at, upright, size, atLeft)
			y += 2.2
			at = word
			continue
		}
		at = strings.TrimSpace(at + " " + word)
	}
	write(d.canvas, marginLeft, y, at, upright, size, atLeft)
}

// headBox sets "N_b,Rd kN": a symbol and its unit.
func headBox(s string) box {
	symbol, unit, _ := strings.Cut(s, " ")
	if symbol == "" {
		return box{}
	}
	b := typeset(formula.Sym(symbol))
	if unit != "" {
		b = row(b, gap(space), textBox(unit, upright, 1))
	}
	return b
}
