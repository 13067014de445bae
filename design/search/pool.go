package search

import (
	"context"
	"runtime"
	"sync"
	"sync/atomic"

	"golang.org/x/sync/errgroup"
)

// chunk is the number of units that a worker takes at a time: large enough
// that taking them costs nothing, small enough that the last worker is not
// waited for.
const chunk = 64

// Workers returns the number of workers that n asks for: n itself, or one per
// processor where n is not positive.
func Workers(n int) int {
	if n > 0 {
		return n
	}
	return runtime.GOMAXPROCS(0)
}

// spread calls do for every unit from 0 to n-1, chunk by chunk, on a pool of
// workers, each with a scratch of its own from start, and returns the error of ctx if it was
// cancelled before all were done. After every chunk progress, if not nil, is
// told how many units are done; it is never called by two workers at once and
// its argument only rises.
func spread[S any](ctx context.Context, workers, n, chunk int, start func() S, do func(S, int), progress func(done int)) error {
	var (
		next atomic.Int64
		mu   sync.Mutex
		done int
	)
	report := func(k int) {
		if progress == nil {
			return
		}
		mu.Lock()
		defer mu.Unlock()
		done += k
		progress(done)
	}
	g, ctx := errgroup.WithContext(ctx)
	for range min(Workers(workers), (n+chunk-1)/chunk) {
		g.Go(func() error {
			scratch := start()
			for {
				from := int(next.Add(int64(chunk))) - chunk
				if from >= n {
					return nil
				}
				to := min(from+chunk, n)
				for i := from; i < to; i++ {
					if err := ctx.Err(); err != nil {
						return err
					}
					do(scratch, i)
				}
				report(to - from)
			}
		})
	}
	return g.Wait()
}
