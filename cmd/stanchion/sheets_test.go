package main

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// The text of the sheets has the words and numbers of the JSON lines.
func TestSheetsHaveTheNumbersOfTheJSON(t *testing.T) {
	tool, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("pdftotext is not installed")
	}
	dir := t.TempDir()
	input, lines, pdf := filepath.Join(dir, "depot.csv"), filepath.Join(dir, "depot.jsonl"), filepath.Join(dir, "depot.pdf")
	data, err := os.ReadFile("../../examples/ottermere-depot.csv")
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(input, data, 0o600))
	run := func(args ...string) {
		con := &console{in: strings.NewReader(""), out: new(bytes.Buffer), err: new(bytes.Buffer)}
		require.Equal(t, statusPasses, execute(context.Background(), con, args), "%v", con.err)
	}
	run("size", input, "-o", filepath.Join(dir, "sized.csv"), "--json", lines)
	run("sheets", input, "-o", pdf)

	text, err := exec.Command(tool, "-layout", pdf, "-").Output()
	require.NoError(t, err)
	pages := map[string]string{}
	number := regexp.MustCompile(`Sheet (\d+) of \d+`)
	for page := range strings.SplitSeq(string(text), "\f") {
		if m := number.FindStringSubmatch(page); m != nil {
			pages[m[1]] += page
		}
	}
	file, err := os.Open(lines)
	require.NoError(t, err)
	defer file.Close()
	members := 0
	for d := json.NewDecoder(file); d.More(); members++ {
		var r map[string]any
		d.UseNumber()
		require.NoError(t, d.Decode(&r))
		page := pages[fmt.Sprint(members+1)]
		for key, value := range r {
			switch key {
			case "note", "axis", "quantity", "cell", "next_lighter_check", "next_lighter_utilisation":
				continue // the sheet says these in other words
			}
			if value != nil {
				assert.Contains(t, page, fmt.Sprint(value), "%s of %s", key, r["mark"])
			}
		}
	}
	assert.Equal(t, 60, members)
}

// Sheets are known again however many there are: the end of a PDF grows with
// them.
func TestManySheetsMayBeWrittenAgain(t *testing.T) {
	if testing.Short() {
		t.Skip("long, and nothing runs side by side")
	}
	dir := t.TempDir()
	input, pdf := filepath.Join(dir, "loads.csv"), filepath.Join(dir, "loads-sheets.pdf")
	rows := "Mark,Length,N_Ed\n"
	for i := range 250 {
		rows += fmt.Sprintf("C%d,3.6,%d\n", i, 400+i)
	}
	require.NoError(t, os.WriteFile(input, []byte(rows), 0o600))
	for range 2 {
		con := &console{in: strings.NewReader(""), out: new(bytes.Buffer), err: new(bytes.Buffer)}
		require.Equal(t, statusPasses, execute(context.Background(), con, []string{"sheets", input}), "%v", con.err)
	}
	data, err := os.ReadFile(pdf)
	require.NoError(t, err)
	require.Greater(t, len(data)-bytes.LastIndex(data, []byte("\nxref\n")), 8<<10)
	for name, other := range map[string][]byte{
		"empty":     {},
		"cut short": data[:len(data)-100],
		"another":   bytes.ReplaceAll(data, []byte("\x00c\x00a\x00l\x00c"), []byte("\x00C\x00a\x00l\x00c")),
		"no place":  []byte("%PDF-1.4\nstartxref\n99999999999\n%%EOF\n"),
	} {
		require.NoError(t, os.WriteFile(pdf, other, 0o600))
		assert.False(t, sheetsEarlier(pdf), name)
	}
}
