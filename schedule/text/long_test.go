package text

import (
	"io"
	"os"
	"path/filepath"
	"runtime"
	"testing"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule"
)

// heap returns the bytes in use.
func heap() int64 {
	runtime.GC()
	var m runtime.MemStats
	runtime.ReadMemStats(&m)
	return int64(m.HeapAlloc)
}

// A schedule of many rows is gone through without being held: what a run needs
// grows by a few bytes a row.
func TestLongSchedulesAreNotHeld(t *testing.T) {
	path := filepath.Join(t.TempDir(), "long.csv")
	const members = 20_000
	if err := os.WriteFile(path, []byte(lines(members)), 0o600); err != nil {
		t.Fatal(err)
	}
	f, err := Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	before := heap()
	plan, err := schedule.Scan(f, schedule.Options{National: ec3.NationalSet})
	if err != nil {
		t.Fatal(err)
	}
	// 24 bytes of reference, 9 of links, as much again for growing slices.
	if each := float64(heap()-before) / (2 * members); each > 70 {
		t.Fatalf("%.0f bytes are held for each row", each)
	}
	w, err := f.NewWriter(io.Discard, plan, schedule.ResultColumns(schedule.ResultOptions{}))
	if err != nil {
		t.Fatal(err)
	}
	n := 0
	for m, err := range plan.Members() {
		if err != nil {
			t.Fatal(err)
		}
		if len(m.Column.Combinations) != 2 {
			t.Fatal(m.Column)
		}
		if err := w.Write(m, &design.Result{}); err != nil {
			t.Fatal(err)
		}
		if len(w.waiting) > 1 {
			t.Fatal("rows wait although each stands beside its member's first")
		}
		n++
	}
	if err := w.Close(); err != nil {
		t.Fatal(err)
	}
	if n != members || plan.Summary.Rows != 2*members {
		t.Fatal(n, plan.Summary.Rows)
	}
}
