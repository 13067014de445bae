package main

import (
	"encoding/csv"
	"encoding/json"
	"math/big"
	"strings"

	"github.com/rogpeppe/go-internal/testscript"
)

// scriptAddsUp wants every table of a take-off to hold the mass that the
// results have, to the last gram: addsup STEEL.csv RESULTS.jsonl.
func scriptAddsUp(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: addsup STEEL.csv RESULTS.jsonl")
	}
	want := new(big.Rat)
	for _, line := range strings.Split(strings.TrimSpace(ts.ReadFile(args[1])), "\n") {
		var m struct {
			Quantity int64
			Mass     json.Number `json:"mass_kg"`
		}
		ts.Check(json.Unmarshal([]byte(line), &m))
		mass, ok := new(big.Rat).SetString(m.Mass.String())
		if !ok {
			ts.Fatalf("no mass in %s", line)
		}
		want.Add(want, mass.Mul(mass, big.NewRat(m.Quantity, 1)))
	}
	rows, err := csv.NewReader(strings.NewReader(ts.ReadFile(args[0]))).ReadAll()
	ts.Check(err)
	sums := map[string]*big.Rat{}
	for _, row := range rows[1:] {
		if sums[row[0]] == nil {
			sums[row[0]] = new(big.Rat)
		}
		mass, ok := new(big.Rat).SetString(row[11])
		if !ok {
			ts.Fatalf("no mass in %v", row)
		}
		sums[row[0]].Add(sums[row[0]], mass)
	}
	for _, table := range []string{"section", "level", "family", "cut", "total"} {
		if got := sums[table]; got == nil || got.Cmp(want) != 0 {
			ts.Fatalf("table %q holds %v kg, the results %s kg", table, got, want.FloatString(6))
		}
	}
}
