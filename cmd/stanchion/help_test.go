package main

import (
	"bytes"
	"context"
	"os"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// The first example in the help of every command works as it stands, in the
// folder that holds the examples.
func TestFirstExampleOfEveryCommandWorks(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, os.CopyFS(dir+"/examples", os.DirFS("../../examples")))
	t.Chdir(dir)
	con := func(out *bytes.Buffer) *console { return &console{in: strings.NewReader(""), out: out, err: out} }
	for _, c := range rootCommand(con(new(bytes.Buffer))).Commands() {
		if !c.IsAvailableCommand() || c.Name() == "help" {
			continue
		}
		t.Run(c.Name(), func(t *testing.T) {
			line, _, _ := strings.Cut(strings.TrimSpace(c.Example), "\n")
			words := typed(line)
			require.NotEmpty(t, words, "no example")
			require.Equal(t, "stanchion", words[0])
			var out bytes.Buffer
			status := execute(context.Background(), con(&out), words[1:])
			// Finished; the ordered sections do not all pass.
			assert.LessOrEqual(t, status, 1, "%s\n%s", line, out.String())
		})
	}
}

// typed splits a command line as a shell does that has double quotes alone.
func typed(line string) (words []string) {
	for _, w := range regexp.MustCompile(`(?:"[^"]*"|[^ "])+`).FindAllString(line, -1) {
		words = append(words, strings.ReplaceAll(w, `"`, ""))
	}
	return words
}

// The help of the settings fits a screen, and says what numbers are by default.
func TestHelpOfTheSettings(t *testing.T) {
	help := settingsHelp()
	for _, line := range strings.Split(help, "\n") {
		assert.LessOrEqual(t, len(line), screenWidth, line)
	}
	assert.Contains(t, help, "\n  limit                   1.00, or a number from 0.01 to 1.50: the greatest utilisation that passes\n")
}
