package calcsheet

import (
	"sync"

	"golang.org/x/image/font"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goitalic"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
)

// face is one of the typefaces of the sheets: the Go fonts, whose licence (that
// of Go itself) lets them stand in a document, and which have Greek letters and
// mathematical signs.
type face uint8

const (
	upright face = iota
	italic
	bold
)

var faceData = [...][]byte{upright: goregular.TTF, italic: goitalic.TTF, bold: gobold.TTF}

// Heights of the typefaces, em.
const (
	ascent  = 0.74 // of figures and capitals
	xHeight = 0.53
	descent = 0.21
	axis    = 0.30 // of the fraction rule above the baseline
)

// metrics knows how wide the characters of a face are, em: those up to known
// without asking the font.
type metrics struct {
	table [known]float64
	font  *sfnt.Font
}

const known = 0x2600

var faces = sync.OnceValue(func() *[3]metrics {
	list := new([3]metrics)
	for i, data := range faceData {
		f, err := sfnt.Parse(data)
		if err != nil {
			panic(err) // the fonts are part of the program
		}
		list[i].font = f
		var buf sfnt.Buffer
		for r := range list[i].table {
			list[i].table[r] = list[i].ask(&buf, rune(r))
		}
	}
	return list
})

// width returns the width of a text, em.
func (f face) width(s string) float64 {
	m := &faces()[f]
	w := 0.0
	for _, r := range s {
		w += m.advance(r)
	}
	return w
}

func (m *metrics) advance(r rune) float64 {
	if r >= 0 && r < known {
		return m.table[r]
	}
	return m.ask(new(sfnt.Buffer), r)
}

// ask asks the font.
func (m *metrics) ask(buf *sfnt.Buffer, r rune) float64 {
	const ppem = 1000
	i, err := m.font.GlyphIndex(buf, r)
	if err != nil {
		return 0.5
	}
	a, err := m.font.GlyphAdvance(buf, i, fixed.I(ppem), font.HintingNone)
	if err != nil {
		return 0.5
	}
	return float64(a) / 64 / ppem
}
