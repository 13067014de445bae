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

// metrics knows how wide the characters of a face are.
type metrics struct {
	widths sync.Map // rune to em
	font   *sfnt.Font
	mu     sync.Mutex
	buf    sfnt.Buffer
}

var faces = sync.OnceValue(func() *[3]metrics {
	list := new([3]metrics)
	for i, data := range faceData {
		f, err := sfnt.Parse(data)
		if err != nil {
			panic(err) // the fonts are part of the program
		}
		list[i].font = f
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
	if w, ok := m.widths.Load(r); ok {
		return w.(float64)
	}
	m.mu.Lock()
	defer m.mu.Unlock()
	const ppem = 1000
	w := 0.5
	if i, err := m.font.GlyphIndex(&m.buf, r); err == nil {
		if a, err := m.font.GlyphAdvance(&m.buf, i, fixed.I(ppem), font.HintingNone); err == nil {
			w = float64(a) / 64 / ppem
		}
	}
	m.widths.Store(r, w)
	return w
}
