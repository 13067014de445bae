package workbook

// The paper and its margins, inches, by which every sheet of ours is printed.
const (
	paperWidth, paperHeight                          = 8.268, 11.693 // A4, upright
	marginSide, marginTop, marginFoot, marginRunning = 0.4, 0.5, 0.6, 0.3
	pointsPerInch, pointsPerPixel                    = 72, 0.75
	pixelsOfDigit, pixelsAboutCell                   = 7, 5 // of Calibri 11
)

// PageRoom returns the height of the rows, in points, that find room on a
// printed page, upright A4, below those that are repeated. It counts on every
// row having a height.
func (s *Sheet) PageRoom() float64 {
	width := 0.0
	for _, w := range s.Widths {
		width += (w*pixelsOfDigit + pixelsAboutCell) * pointsPerPixel
	}
	scale := min(1, (paperWidth-2*marginSide)*pointsPerInch/width)
	room := (paperHeight - marginTop - marginFoot) * pointsPerInch / scale
	for r := 1; r <= s.RepeatRows; r++ {
		room -= s.Heights[r]
	}
	return room
}
