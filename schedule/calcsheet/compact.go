package calcsheet

import "math"

// compact joins texts of a box that stand side by side in one type, so that a
// page says fewer things and a search finds whole words and sums. Where a
// blank's room is between them, a blank goes between.
func compact(b box) box {
	var kept []mark
	for _, m := range b.marks {
		if len(kept) > 0 && join(&kept[len(kept)-1], &m) {
			continue
		}
		kept = append(kept, m)
	}
	b.marks = kept
	return b
}

// join adds a text to the one before it, and reports whether it could.
func join(a, b *mark) bool {
	const near = 0.012 // em: what nobody sees
	if a.text == "" || b.text == "" || a.face != b.face || a.size != b.size || math.Abs(a.y-b.y) > 1e-9 {
		return false
	}
	between := b.x - a.x - a.face.width(a.text)*a.size
	switch blank := a.face.width(" ") * a.size; {
	case math.Abs(between) < near:
		a.text += b.text
	case math.Abs(between-blank) < near:
		a.text += " " + b.text
	default:
		return false
	}
	return true
}
