package workbook

import (
	"bytes"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestWriteNew(t *testing.T) {
	sheets := []Sheet{
		{Name: "Take-off", Rows: [][]Cell{{{Value: "Section", Look: Look{Role: Heading}}, {Value: 1.25, Look: Look{Role: Result, Format: Decimals(3)}}}}},
		{Name: "Cutting: list", Rows: [][]Cell{{{Value: "x"}}}},
	}
	var a, b bytes.Buffer
	require.NoError(t, WriteNew(&a, sheets))
	require.NoError(t, WriteNew(&b, sheets))
	assert.Equal(t, a.Bytes(), b.Bytes())
	assert.Contains(t, dump(t, a.Bytes()), "Take-off!B1 = 1.250")
	assert.Contains(t, dump(t, a.Bytes()), "Cutting- list!A1 = x")

	path := filepath.Join(t.TempDir(), "new.xlsx")
	require.NoError(t, os.WriteFile(path, a.Bytes(), 0o600))
	assert.True(t, WrittenByUs(path))
	assert.Panics(t, func() { WriteNew(&a, []Sheet{{Name: "A"}, {Name: "A"}}) })
}
