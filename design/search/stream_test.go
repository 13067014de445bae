package search

import (
	"context"
	"errors"
	"iter"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// jobs yields a job for each column, its tag the index.
func jobs(cols []design.Column) iter.Seq2[*Job[int], error] {
	return func(yield func(*Job[int], error) bool) {
		for i := range cols {
			if !yield(&Job[int]{Column: cols[i], Tag: i}, nil) {
				return
			}
		}
	}
}

// Stream emits, in order, what SizeAll and CheckAll find.
func TestStreamIsSizeAllInOrder(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(5), 5*chunk+7, true)
	for i := range cols {
		if i%3 == 0 {
			cols[i].Given = "254x254x73 UKC"
		}
	}
	for _, mode := range []Mode{Size, Check} {
		want, err := e.all(context.Background(), mode, cols, 1, nil)
		require.NoError(t, err)
		for _, workers := range []int{1, 2, 5} {
			next := 0
			err := Stream(context.Background(), e, mode, workers, jobs(cols), func(j *Job[int]) error {
				require.Equal(t, next, j.Tag)
				require.Equal(t, want[j.Tag], j.Result)
				next++
				return nil
			})
			require.NoError(t, err)
			assert.Equal(t, len(cols), next)
		}
	}
}

func TestStreamPassesSkippedJobsThrough(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	said := design.Result{Status: design.NotRead, Notes: []string{"N_Ed is \"tbc\""}}
	in := func(yield func(*Job[int], error) bool) {
		yield(&Job[int]{Skip: true, Result: said, Column: design.Column{Group: "G"}}, nil)
	}
	n := 0
	require.NoError(t, Stream(context.Background(), e, Size, 2, in, func(j *Job[int]) error {
		assert.Equal(t, said, j.Result)
		n++
		return nil
	}))
	assert.Equal(t, 1, n)
}

// However long the schedule, only a few chunks for each worker are held.
func TestStreamHoldsFewJobs(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	col := columns(random(5), 1, false)[0]
	const workers = 2
	read, emitted, most := 0, 0, 0
	in := func(yield func(*Job[int], error) bool) {
		for range 200 * chunk {
			read++
			if !yield(&Job[int]{Column: col}, nil) {
				return
			}
		}
	}
	gate := make(chan struct{}, 1) // orders the two goroutines' use of the counts
	gate <- struct{}{}
	require.NoError(t, Stream(context.Background(), e, Size, workers, func(yield func(*Job[int], error) bool) {
		in(func(j *Job[int], err error) bool {
			<-gate
			most = max(most, read-emitted)
			gate <- struct{}{}
			return yield(j, err)
		})
	}, func(*Job[int]) error {
		<-gate
		emitted++
		gate <- struct{}{}
		return nil
	}))
	assert.Equal(t, 200*chunk, emitted)
	assert.LessOrEqual(t, most, (2*workers+4)*chunk)
}

func TestStreamEndsAtTheFirstError(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(6), 20*chunk, false)
	bad := errors.New("disk full")

	err := Stream(context.Background(), e, Size, 2, jobs(cols), func(j *Job[int]) error {
		if j.Tag == chunk+3 {
			return bad
		}
		require.Less(t, j.Tag, chunk+3)
		return nil
	})
	assert.ErrorIs(t, err, bad, "of emit")

	torn := errors.New("torn file")
	err = Stream(context.Background(), e, Size, 2, func(yield func(*Job[int], error) bool) {
		_ = yield(&Job[int]{Column: cols[0]}, nil) && yield(nil, torn)
	}, func(*Job[int]) error { return nil })
	assert.ErrorIs(t, err, torn, "of in")

	ctx, cancel := context.WithCancel(context.Background())
	err = Stream(ctx, e, Size, 2, jobs(cols), func(*Job[int]) error { cancel(); return nil })
	assert.ErrorIs(t, err, context.Canceled, "of the context")

	cols[5].Group = "G1"
	err = Stream(context.Background(), e, Size, 2, jobs(cols), func(*Job[int]) error { return nil })
	group, ok := errors.AsType[*GroupError](err)
	require.True(t, ok)
	assert.Equal(t, "G1", group.Group)
}
