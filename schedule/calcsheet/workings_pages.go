package calcsheet

// paginate sees to it that the block just written is not split over printed
// pages if it finds room on one, and between subjects if it does not.
func (w *Workings) paginate() {
	last := len(w.page.Rows)
	first := w.parts[0]
	height := w.heights(first, last)
	w.used += w.heights(max(first-1, w.page.FreezeRows+1), first-1)
	if w.used+height <= w.room {
		w.used += height
		return
	}
	if w.used > w.room/8 {
		w.turn(first)
	}
	for i, from := range w.parts {
		to := last
		if i+1 < len(w.parts) {
			to = w.parts[i+1] - 1
		}
		part := w.heights(from, to)
		if w.used+part > w.room && w.used > 0 {
			w.turn(from)
		}
		w.used += part
		for w.used > w.room { // a subject longer than a page
			w.used -= w.room
		}
	}
}

// turn begins a printed page with a row.
func (w *Workings) turn(row int) {
	w.page.Breaks = append(w.page.Breaks, row)
	w.used = 0
}

// heights adds up the heights of rows.
func (w *Workings) heights(from, to int) float64 {
	sum := 0.0
	for row := from; row <= to; row++ {
		sum += w.page.Heights[row]
	}
	return sum
}
