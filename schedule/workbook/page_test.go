package workbook

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
)

func TestPageHeights(t *testing.T) {
	p := NewPage("A", "Title", 10, 22)
	p.Row(TextCell("a"), WordsCell("short"))
	p.Row(TextCell("a"), WordsCell("four words in a cell that is not wide"))
	p.Row(WordsCell(strings.Repeat("word ", 1000)))
	p.Across(2, Cell{Value: strings.Repeat("word ", 10)})
	assert.NotContains(t, p.Heights, 2)
	assert.Equal(t, 31.0, p.Heights[3])
	assert.Equal(t, 409.0, p.Heights[4]) // as high as a row may be
	assert.Equal(t, 31.0, p.Heights[5])
	assert.Equal(t, []string{"A5:B5"}, p.Merges)
}

func TestPlace(t *testing.T) {
	assert.Equal(t, "'Bob''s sheet'!B12", Place("Bob's sheet", "Bob's sheet!B12"))
	assert.Empty(t, Place("", "line 12"))
}
