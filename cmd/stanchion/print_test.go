package main

import (
	"bytes"
	"context"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// printedPages returns what stands on the pages that another program prints of
// a workbook.
func printedPages(t *testing.T, path string) []string {
	t.Helper()
	pdf := office(t, path, "pdf")
	program, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("pdftotext is not installed")
	}
	out, err := exec.Command(program, "-layout", pdf, "-").Output()
	require.NoError(t, err)
	return strings.Split(string(out), "\f")
}

// runOf runs a command that ends with a status.
func runOf(t *testing.T, status int, args ...string) {
	t.Helper()
	var said bytes.Buffer
	con := &console{in: bytes.NewReader(nil), out: &said, err: &said}
	require.Equal(t, status, execute(context.Background(), con, args), said.String())
}

func TestChangesAreSeenOnPaper(t *testing.T) {
	path := filepath.Join(t.TempDir(), "compared.xlsx")
	runOf(t, 1, "compare", "../../examples/ottermere-depot-ordered.csv", depot, "-o", path)
	pages := printedPages(t, path)
	assert.NotContains(t, pages[0], "Result:", "the schedule prints as it did")
	line := func(pages []string, mark string) string {
		for _, p := range pages {
			if strings.Contains(p, "Result:") {
				return regexp.MustCompile(`(?m)^.*\b` + mark + `\b.*$`).FindString(p)
			}
		}
		return ""
	}
	changed := line(pages, "A1-01")
	assert.Contains(t, changed, "≠ changed", "a mark and a word beside the member's own mark")
	assert.Regexp(t, `L0 +L1`, changed, "and its levels")
	assert.Regexp(t, `N_Ed ULS1 \d+ → 1556 kN`, changed)
}

func TestThePaperIsChosen(t *testing.T) {
	if testing.Short() {
		t.Skip("another program opens what was written: long, and nothing runs side by side")
	}
	for paper, size := range map[string]string{"A4": "595.304 x 841.89", "A3": "841.89 x 1190.55"} {
		path := filepath.Join(t.TempDir(), "sized.xlsx")
		runOf(t, 0, "size", depot, "-o", path, "--set", "paper="+paper, "--quiet")
		pdf := office(t, path, "pdf")
		program, err := exec.LookPath("pdfinfo")
		if err != nil {
			t.Skip("pdfinfo is not installed")
		}
		out, err := exec.Command(program, "-l", "4", pdf).Output()
		require.NoError(t, err)
		assert.Regexp(t, `Page +4 size: +`+size, string(out), "the summary, behind the user's own sheets")
	}
}
