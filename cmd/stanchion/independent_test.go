package main

import (
	"encoding/csv"
	"encoding/json"
	"math"
	"strconv"
	"strings"

	"github.com/rogpeppe/go-internal/testscript"
)

// scriptAgrees compares results with those of a separate calculation: agrees
// TOLERANCE EXPECTED.csv RESULTS.jsonl. The first column of the expected ones is
// the mark, the others are keys of a line; an empty cell is null, and a - is not
// compared. The tolerance is relative.
func scriptAgrees(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 3 {
		ts.Fatalf("usage: agrees TOLERANCE EXPECTED.csv RESULTS.jsonl")
	}
	tolerance, err := strconv.ParseFloat(args[0], 64)
	ts.Check(err)
	lines := linesByMark(ts, args[2])
	rows, err := csv.NewReader(strings.NewReader(ts.ReadFile(args[1]))).ReadAll()
	ts.Check(err)
	if len(rows)-1 != len(lines) || len(lines) == 0 {
		ts.Fatalf("%d members expected, %d found", len(rows)-1, len(lines))
	}
	for _, row := range rows[1:] {
		line, ok := lines[row[0]]
		if !ok {
			ts.Fatalf("no member %s", row[0])
		}
		for k := 1; k < len(row); k++ {
			if got := line[rows[0][k]]; !agrees(row[k], got, tolerance) {
				ts.Fatalf("%s: %s is %v, expected %s\n%v", row[0], rows[0][k], got, row[k], line)
			}
		}
	}
}

func linesByMark(ts *testscript.TestScript, file string) map[string]map[string]any {
	lines := map[string]map[string]any{}
	for _, text := range strings.Split(strings.TrimSpace(ts.ReadFile(file)), "\n") {
		var line map[string]any
		ts.Check(json.Unmarshal([]byte(text), &line))
		mark, _ := line["mark"].(string)
		lines[mark] = line
	}
	return lines
}

func agrees(want string, got any, tolerance float64) bool {
	if want == "-" {
		return true
	}
	x, isNumber := got.(float64)
	if want == "" {
		return !isNumber
	}
	w, err := strconv.ParseFloat(want, 64)
	return err == nil && isNumber && math.Abs(x-w) <= tolerance*math.Abs(w)
}
