package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// The committed files are what this program writes: text to the byte,
// workbooks cell by cell.
func TestExamplesAreMade(t *testing.T) {
	files, err := contents()
	require.NoError(t, err)
	for name, made := range files {
		t.Run(name, func(t *testing.T) {
			committed, err := os.ReadFile(filepath.Join("..", name))
			require.NoError(t, err)
			if strings.HasSuffix(name, ".xlsx") {
				assert.Equal(t, cellsOf(t, made), cellsOf(t, committed))
			} else {
				assert.Equal(t, string(made), string(committed))
			}
		})
	}
}

func cellsOf(t *testing.T, book []byte) map[string][][]string {
	f, err := excelize.OpenReader(bytes.NewReader(book))
	require.NoError(t, err)
	defer f.Close()
	sheets := map[string][][]string{}
	for _, name := range f.GetSheetList() {
		sheets[name], err = f.GetRows(name)
		require.NoError(t, err)
	}
	return sheets
}

// What a length carries is what the length above carries, and its own floor.
func TestForcesGrowDownTheStack(t *testing.T) {
	lines := issue(firstIssue)
	assert.Len(t, lines, 60)
	for i := 1; i < len(lines); i++ {
		if lines[i].grid == lines[i-1].grid && lines[i].from != "L0" {
			assert.Less(t, lines[i].uls1, lines[i-1].uls1, lines[i].mark)
		}
	}
}
