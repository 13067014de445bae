package main

import (
	"errors"
	"strconv"
	"strings"
)

// span is a range of numbers; 0 does not limit.
type span struct{ least, most float64 }

func (s span) holds(v float64) bool { return v >= s.least && (s.most == 0 || v <= s.most) }

// parseSpan reads LEAST..GREATEST, where either may be left out, or one number.
func parseSpan(text string) (span, error) {
	if text == "" {
		return span{}, nil
	}
	low, high, ranged := strings.Cut(text, "..")
	if !ranged {
		high = low
	}
	s := span{}
	for _, part := range []struct {
		text string
		to   *float64
	}{{low, &s.least}, {high, &s.most}} {
		if part.text = strings.TrimSpace(part.text); part.text == "" {
			continue
		}
		v, err := strconv.ParseFloat(part.text, 64)
		if err != nil || !(v > 0 && v < 1e6) {
			return span{}, errors.New("give a range: 200..260, or one end alone (..260)")
		}
		*part.to = v
	}
	if s.most > 0 && s.least > s.most || s == (span{}) {
		return span{}, errors.New("nothing lies in this range: give LEAST..GREATEST")
	}
	return s, nil
}
