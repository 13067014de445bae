package search

import (
	"context"
	"errors"
	"sync/atomic"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

func TestSpreadDoesEveryUnitOnce(t *testing.T) {
	for _, n := range []int{0, 1, chunk - 1, chunk, chunk + 1, 5*chunk + 3} {
		for _, workers := range []int{0, 1, 2, 9} {
			count := make([]atomic.Int32, n)
			err := spread(context.Background(), workers, n, chunk, func() int { return 0 },
				func(_, i int) { count[i].Add(1) }, nil)
			require.NoError(t, err)
			for i := range count {
				require.EqualValues(t, 1, count[i].Load(), "unit %d of %d", i, n)
			}
		}
	}
}

func TestProgressRisesToTheEnd(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(3), 3*chunk+5, false)
	cols[7].Group, cols[70].Group = "G", "G"
	var told []int
	_, err := e.SizeAll(context.Background(), cols, 2, func(done int) { told = append(told, done) })
	require.NoError(t, err)
	require.IsIncreasing(t, told)
	assert.Equal(t, len(cols), told[len(told)-1])
}

// Cancelling stops within a chunk, and there are no results.
func TestCancelStopsWithinAChunk(t *testing.T) {
	const workers = 2
	ctx, cancel := context.WithCancel(context.Background())
	var after atomic.Int32
	err := spread(ctx, workers, 1000*chunk, chunk, func() int { return 0 }, func(_, i int) {
		if ctx.Err() != nil {
			after.Add(1)
		}
		if i == chunk/2 {
			cancel()
		}
	}, nil)
	require.ErrorIs(t, err, context.Canceled)
	assert.LessOrEqual(t, after.Load(), int32(workers), "units begun before the cancel was seen")

	e := engineOf(t, settingsOf(t, "UK"))
	results, err := e.SizeAll(ctx, columns(random(3), 10, false), workers, nil)
	require.ErrorIs(t, err, context.Canceled)
	assert.Nil(t, results)
}

// A defect met in one column is said there and in the error; every other
// column has its result.
func TestDefectLeavesTheOthers(t *testing.T) {
	var b bugs
	e := engineOf(t, settingsOf(t, "UK"))
	broken := e.worker(Size, &b)
	broken.engine = nil // what a defect might look like
	whole := e.worker(Size, &b)
	cols := columns(random(4), 2, false)
	cols[0].Mark, cols[0].Cell = "C7", "Columns!A9"
	var res [2]design.Result
	broken.one(&cols[0], &res[0])
	whole.one(&cols[1], &res[1])

	assert.Equal(t, design.NotRead, res[0].Status)
	assert.Contains(t, res[0].Notes[0], "please report it")
	assert.Equal(t, design.Passes, res[1].Status)
	bug, ok := errors.AsType[*BugError](b.err())
	require.True(t, ok)
	assert.Contains(t, bug.Error(), "C7 (Columns!A9)")
	assert.Contains(t, string(bug.Stack), "TestDefectLeavesTheOthers")
}

// The same for members that are designed together.
func TestDefectInAGroup(t *testing.T) {
	var b bugs
	w := engineOf(t, settingsOf(t, "UK")).worker(Size, &b)
	w.engine = nil
	cols := columns(random(4), 2, false)
	var res [2]design.Result
	w.together(&Set{"a group", []int{0, 1}}, cols, res[:], (*team).size)
	assert.Error(t, b.err())
	assert.Equal(t, design.NotRead, res[0].Status)
	assert.Equal(t, design.NotRead, res[1].Status)
}
