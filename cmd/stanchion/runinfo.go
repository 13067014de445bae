package main

import (
	"crypto/sha256"
	"encoding/hex"
	"io"
	"os"
	"path/filepath"

	"stanchion/schedule/summary"
)

// standard is what the results rest on.
const standard = "EN 1993-1-1:2005 + A1:2014"

// blockTitle stands over the results.
func (r *run) blockTitle() string {
	return "Results: " + standard + ", national set " + r.plan.Settings.Design.National.Name
}

// info gathers what the project's own sheets say of the run.
func (r *run) info() (*summary.Info, error) {
	sum, err := fileSum(r.input)
	if err != nil {
		return nil, err
	}
	return &summary.Info{
		Project:  r.plan.Settings.Project,
		Program:  "stanchion " + versionText(),
		Standard: standard,
		National: &r.plan.Settings.Design.National,
		Sheet:    r.plan.Sheet,
		File:     filepath.Base(r.input),
		SHA256:   sum,
		Settings: r.plan.Settings.Used(),
		Reading:  &r.plan.Summary,
		Cautions: []string{caution, notCovered},
		Limit:    r.plan.Settings.Design.Limit,
	}, nil
}

// fileSum returns the SHA-256 of a file, so that a reader can tell from which
// issue of a schedule the results come.
func fileSum(path string) (string, error) {
	f, err := os.Open(path)
	if err != nil {
		return "", err
	}
	defer f.Close()
	h := sha256.New()
	if _, err := io.Copy(h, f); err != nil {
		return "", err
	}
	return hex.EncodeToString(h.Sum(nil)), nil
}
