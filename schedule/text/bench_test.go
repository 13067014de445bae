package text

import (
	"fmt"
	"io"
	"strings"
	"testing"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule"
)

// lines is a schedule of n members of two combinations each, the rows of one
// standing next to each other.
func lines(n int) string {
	var b strings.Builder
	b.WriteString("Mark,Grid,Level from,Level to,Combination,Length (m),N_Ed (kN),Restraints z-z,Ends y-y,Grade\n")
	holds := []string{"", "mid", "thirds", "1.5; 3.0"}
	for i := range n {
		for c := range 2 {
			fmt.Fprintf(&b, "C%d,A%d,L%d,L%d,ULS%d,%.1f,%d,%s,fixed-pinned,S355\n", i, i%97, i%7, i%7+1, c+1, 3.5+float64(i%10)/10, 100+i%2900, holds[i%4])
		}
	}
	return b.String()
}

// BenchmarkScan and the two below go through 20 000 rows.
func BenchmarkScan(b *testing.B) {
	content := lines(10_000)
	f, err := OpenReader(strings.NewReader(content), "loads.csv")
	if err != nil {
		b.Fatal(err)
	}
	defer f.Close()
	b.SetBytes(int64(len(content)))
	b.ReportAllocs()
	for b.Loop() {
		if _, err := schedule.Scan(f, schedule.Options{National: ec3.NationalSet}); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkMembers(b *testing.B) {
	content := lines(10_000)
	f, err := OpenReader(strings.NewReader(content), "loads.csv")
	if err != nil {
		b.Fatal(err)
	}
	defer f.Close()
	plan, err := schedule.Scan(f, schedule.Options{National: ec3.NationalSet})
	if err != nil {
		b.Fatal(err)
	}
	b.SetBytes(int64(len(content)))
	b.ReportAllocs()
	for b.Loop() {
		n := 0
		for _, err := range plan.Members() {
			if err != nil {
				b.Fatal(err)
			}
			n++
		}
		if n != 10_000 {
			b.Fatal(n)
		}
	}
}

func BenchmarkWrite(b *testing.B) {
	content := lines(10_000)
	f, err := OpenReader(strings.NewReader(content), "loads.csv")
	if err != nil {
		b.Fatal(err)
	}
	defer f.Close()
	s, err := schedule.Read(f, schedule.Options{National: ec3.NationalSet})
	if err != nil {
		b.Fatal(err)
	}
	cols := schedule.ResultColumns(schedule.ResultOptions{})
	r := design.Result{Section: "203x203x46 UKC", Grade: "S355", Utilisation: 0.87, MassPerM: 46.1, Mass: 184.4}
	r.Y.NbRd, r.Z.NbRd, r.Y.Chi, r.Z.Chi = 1.2e6, 0.9e6, 0.83, 0.67
	b.SetBytes(int64(len(content)))
	b.ReportAllocs()
	for b.Loop() {
		w, err := f.NewWriter(io.Discard, s.Plan, cols)
		if err != nil {
			b.Fatal(err)
		}
		for i := range s.Members {
			if err := w.Write(&s.Members[i], &r); err != nil {
				b.Fatal(err)
			}
		}
		if err := w.Close(); err != nil {
			b.Fatal(err)
		}
	}
}
