package calcsheet

// filler sets boxes into lines.
type filler struct {
	width, indent float64
	lines         []line
	at            float64
}

// start opens a line.
func (f *filler) start(x float64) {
	f.lines = append(f.lines, line{})
	f.at = x
}

func (f *filler) put(b *box) {
	f.lines[len(f.lines)-1].put(b, f.at)
	f.at += b.w
}

// place puts a box on the line, or on a new one where it finds no room.
func (f *filler) place(b *box) {
	if room := f.width - f.indent; b.w > room {
		small := b.scaled(room / b.w) // one piece too long for a line
		b = &small
	}
	if f.at+b.w > f.width && f.at > f.indent {
		f.start(f.indent)
	}
	f.put(b)
}

// fill sets boxes one after another from x on, further lines from indent on.
func (s *setter) fill(list []box, x, indent float64) []line {
	f := filler{width: s.width, indent: indent}
	f.start(x)
	for i := range list {
		f.place(&list[i])
	}
	return f.lines
}
