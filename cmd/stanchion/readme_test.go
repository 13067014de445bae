package main

import (
	"bytes"
	"io/fs"
	"os"
	"path"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/schedule"
)

// The README names every command and every setting.
func TestReadmeIsComplete(t *testing.T) {
	text, err := os.ReadFile("../../README.md")
	require.NoError(t, err)
	readme := string(text)
	for _, c := range rootCommand(&console{out: new(bytes.Buffer), err: new(bytes.Buffer)}).Commands() {
		if c.IsAvailableCommand() && c.Name() != "help" {
			assert.Contains(t, readme, "\n| `"+c.Name(), "the table of commands")
		}
	}
	_, settings, found := strings.Cut(readme, "| setting |")
	require.True(t, found)
	settings, _, _ = strings.Cut(settings, "\n\n")
	for _, s := range schedule.SettingInfos() {
		name, _, _ := strings.Cut(s.Name, " [") // cost [FAMILY] [GRADE]
		if name != "map HEADING" {              // --map, among the flags
			assert.Contains(t, settings, name, "the table of settings")
		}
	}
}

// DEVELOPERS.md names every package.
func TestListOfPackagesIsComplete(t *testing.T) {
	text, err := os.ReadFile("../../DEVELOPERS.md")
	require.NoError(t, err)
	root := os.DirFS("../..")
	for _, top := range []string{"catalogue", "cmd", "design", "schedule"} {
		require.NoError(t, fs.WalkDir(root, top, func(dir string, d fs.DirEntry, err error) error {
			if err != nil || !d.IsDir() {
				return err
			}
			if d.Name() == "testdata" || d.Name() == "internal" || d.Name() == "formula" {
				return fs.SkipDir // parts of the package above
			}
			if files, _ := fs.Glob(root, path.Join(dir, "*.go")); len(files) > 0 {
				assert.Contains(t, string(text), "`"+dir+"`")
			}
			return nil
		}))
	}
}
