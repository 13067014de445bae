package schedule

import "strings"

// decimalVote gathers from all numbers of a file which decimal mark it uses.
type decimalVote struct {
	point, comma int // numbers that can be read with this mark only
	// Numbers such as 3,500 can be read either way. In a column of lengths
	// only one of the two readings may be a length that a column can have.
	likelyPoint, likelyComma int
	openPoint, openComma     string // the first with this mark that nothing tells of
}

// see takes the evidence of one number. plausible tells whether a value of its
// column can be true; nil where any can.
func (d *decimalVote) see(s string, plausible func(float64) bool) {
	if strings.IndexByte(s, ',') < 0 && strings.IndexByte(s, '.') < 0 {
		return
	}
	asPoint, restPoint, errPoint := splitNumber(s, '.')
	asComma, restComma, errComma := splitNumber(s, ',')
	point, comma := errPoint == nil && isUnitOrNothing(restPoint), errComma == nil && isUnitOrNothing(restComma)
	switch {
	case point && !comma:
		d.point++
	case comma && !point:
		d.comma++
	case !point, asPoint == asComma: // neither reads, or it makes no difference
	case plausible != nil && plausible(asPoint) && !plausible(asComma):
		d.likelyPoint++
	case plausible != nil && plausible(asComma) && !plausible(asPoint):
		d.likelyComma++
	case strings.IndexByte(s, ',') < 0:
		keepFirst(&d.openPoint, s)
	default:
		keepFirst(&d.openComma, s)
	}
}

func keepFirst(kept *string, s string) {
	if *kept == "" {
		*kept = strings.Clone(trim(s))
	}
}

func isUnitOrNothing(s string) bool {
	if s == "" {
		return true
	}
	_, known, _ := findUnit(s)
	return known
}

// mark returns the decimal mark, hint where no number tells.
func (d *decimalVote) mark(hint byte) byte {
	switch {
	case d.point != d.comma:
		return pick(d.point > d.comma)
	case d.likelyPoint != d.likelyComma:
		return pick(d.likelyPoint > d.likelyComma)
	case hint == ',':
		return ','
	default:
		return '.'
	}
}

func pick(point bool) byte {
	if point {
		return '.'
	}
	return ','
}

// unsure returns a number that is read with a decimal mark where nothing but
// custom speaks for it; "" where there is none. The other reading is a thousand
// times greater.
func (d *decimalVote) unsure(hint byte) string {
	switch {
	case d.point != d.comma || d.likelyPoint != d.likelyComma:
		return ""
	case d.mark(hint) == ',':
		return d.openComma
	default:
		return d.openPoint
	}
}

// mixed reports whether some numbers contradict the mark that was chosen, and
// how many.
func (d *decimalVote) mixed() int { return min(d.point, d.comma) }
