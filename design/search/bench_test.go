package search

import (
	"context"
	"fmt"
	"testing"

	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// benchColumns are columns under axial force alone: two combinations, ends and
// restraints in words, as most of a schedule is.
func benchColumns(n int) []design.Column {
	r := random(1)
	cols := make([]design.Column, n)
	for i := range cols {
		c := &cols[i]
		c.Mark, c.Cell, c.Quantity, c.Length = "C", "A1", 1, between(r, 2500, 12000)
		if r.IntN(2) == 0 {
			c.Y.Bottom.Condition = design.Fixed
		}
		switch r.IntN(3) {
		case 0:
			c.Z.Restraints = []float64{c.Length / 2}
		case 1:
			c.Z.Lcr = c.Length * between(r, 0.5, 1)
		}
		most := [...]float64{1e6, 4e6, 1.2e7}[r.IntN(3)]
		c.Combinations = []design.Combination{{NEd: between(r, 0, most)}, {NEd: between(r, 0, most)}}
	}
	return cols
}

func perSecond(b *testing.B, members int) {
	b.ReportMetric(float64(members)*float64(b.N)/b.Elapsed().Seconds(), "members/s")
}

// BenchmarkAxial takes columns under axial force alone to the lightest section
// of the full UKC and UKB list.
func BenchmarkAxial(b *testing.B) {
	e := engineOf(b, settingsOf(b, "UK"))
	cols := benchColumns(100_000)
	for _, workers := range []int{1, 2} {
		b.Run(fmt.Sprintf("workers=%d", workers), func(b *testing.B) {
			for b.Loop() {
				_, err := e.Lightest(context.Background(), cols, workers)
				require.NoError(b, err)
			}
			perSecond(b, len(cols))
		})
	}
}

// BenchmarkAxialInner is the search alone, from what a column asks of the
// axial checks.
func BenchmarkAxialInner(b *testing.B) {
	e := engineOf(b, settingsOf(b, "UK"))
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(b, err)
	cols := benchColumns(4096)
	workers := make([]*worker, len(cols))
	for i := range cols {
		workers[i] = e.worker(Size, &bugs{})
		require.NoError(b, workers[i].take(&cols[i]))
	}
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		workers[i%len(workers)].first(l, 1)
	}
	perSecond(b, 1)
}

// BenchmarkSizeAll takes columns to results, evidence and all.
func BenchmarkSizeAll(b *testing.B) {
	e := engineOf(b, settingsOf(b, "UK"))
	for _, load := range []struct {
		name string
		cols []design.Column
	}{{"axial", benchColumns(50_000)}, {"mixed", columns(random(1), 5_000, true)}} {
		for _, workers := range []int{1, 2} {
			b.Run(fmt.Sprintf("%s/workers=%d", load.name, workers), func(b *testing.B) {
				b.ReportAllocs()
				for b.Loop() {
					_, err := e.SizeAll(context.Background(), load.cols, workers, nil)
					require.NoError(b, err)
				}
				perSecond(b, len(load.cols))
			})
		}
	}
}

// BenchmarkStream takes columns through the ordered stream.
func BenchmarkStream(b *testing.B) {
	e := engineOf(b, settingsOf(b, "UK"))
	cols := benchColumns(50_000)
	for b.Loop() {
		require.NoError(b, Stream(context.Background(), e, Size, 0, jobs(cols), func(*Job[int]) error { return nil }))
	}
	perSecond(b, len(cols))
}

// BenchmarkCheckAll finds the reserve of columns with moments.
func BenchmarkCheckAll(b *testing.B) {
	e := engineOf(b, settingsOf(b, "UK"))
	cols := columns(random(1), 2_000, true)
	for i := range cols {
		cols[i].Given = "305x305x97 UKC"
	}
	for b.Loop() {
		_, err := e.CheckAll(context.Background(), cols, 1, nil)
		require.NoError(b, err)
	}
	perSecond(b, len(cols))
}
