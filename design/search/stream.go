package search

import (
	"context"
	"iter"

	"golang.org/x/sync/errgroup"

	"stanchion/design"
)

// Mode says what is asked of a column.
type Mode uint8

// The modes.
const (
	Size  Mode = iota // choose the section; a given one is kept and checked
	Check             // check the given section, with its reserve
)

// Job is one column on its way through Stream, with whatever the caller wants
// to see again beside its result.
type Job[T any] struct {
	Column design.Column
	Result design.Result
	Skip   bool // not to be designed: Result passes through as it is
	Tag    T
}

// Stream designs columns that are too many to hold. It takes jobs from in,
// designs them on a pool of workers, and calls emit with each in the order in
// which it came. At any time it holds a few chunks of jobs for each worker and
// no more; a job may be used again once emit has returned.
//
// The first error, of in, of emit or of ctx, ends the stream and is returned.
// A defect of this program met in a column is told in that column's result,
// the others go on, and a *BugError is returned at the end. in and emit are
// each called from one goroutine, and the two run at the same time. Members of
// a group share one section and can stand anywhere in a schedule, so Stream
// cannot size them: it ends with a *GroupError that names the first; use
// SizeAll. Nor can it see what stands on what: where the lengths of a column line
// depend on each other (Coupled) it ends with an error at once.
func Stream[T any](ctx context.Context, e *Engine, mode Mode, workers int, in iter.Seq2[*Job[T], error], emit func(*Job[T]) error) error {
	if e.Coupled() {
		return errCoupled
	}
	workers = Workers(workers)
	g, ctx := errgroup.WithContext(ctx)
	var bugs bugs

	todo := make(chan *batch[T], workers)    // to be designed, by whoever is free
	order := make(chan *batch[T], 2*workers) // the same, in the order of in
	spare := make(chan *batch[T], 3*workers+2)

	g.Go(func() error {
		defer close(order)
		defer close(todo)
		return feed(ctx, mode, in, todo, order, spare)
	})
	for range workers {
		g.Go(func() error {
			w := e.worker(mode, &bugs)
			for b := range todo {
				for _, j := range b.jobs {
					if err := ctx.Err(); err != nil {
						return err
					}
					if !j.Skip {
						w.one(&j.Column, &j.Result)
					}
				}
				b.done <- struct{}{}
			}
			return nil
		})
	}
	g.Go(func() error { return drain(ctx, order, spare, emit) })
	if err := g.Wait(); err != nil {
		return err
	}
	return bugs.err()
}

// batch is a run of jobs that one worker designs.
type batch[T any] struct {
	jobs []*Job[T]
	done chan struct{} // holds one token once every job is designed
}

// feed cuts in into batches and hands each to the workers and, in order, to
// the emitter.
func feed[T any](ctx context.Context, mode Mode, in iter.Seq2[*Job[T], error], todo, order, spare chan *batch[T]) error {
	b := fresh(spare)
	hand := func() error {
		for _, c := range []chan *batch[T]{order, todo} {
			select {
			case c <- b:
			case <-ctx.Done():
				return ctx.Err()
			}
		}
		return nil
	}
	for j, err := range in {
		if err != nil {
			return err
		}
		if mode == Size && !j.Skip && j.Column.Group != "" {
			return &GroupError{Group: j.Column.Group, Cell: j.Column.Cell}
		}
		b.jobs = append(b.jobs, j)
		if len(b.jobs) < chunk {
			continue
		}
		if err := hand(); err != nil {
			return err
		}
		b = fresh(spare)
	}
	if len(b.jobs) == 0 {
		return nil
	}
	return hand()
}

// fresh returns an empty batch, one that was used before if there is one.
func fresh[T any](spare chan *batch[T]) *batch[T] {
	select {
	case b := <-spare:
		clear(b.jobs)
		b.jobs = b.jobs[:0]
		return b
	default:
		return &batch[T]{jobs: make([]*Job[T], 0, chunk), done: make(chan struct{}, 1)}
	}
}

// drain waits for each batch in turn and emits its jobs.
func drain[T any](ctx context.Context, order, spare chan *batch[T], emit func(*Job[T]) error) error {
	for b := range order {
		select {
		case <-b.done:
		case <-ctx.Done():
			return ctx.Err()
		}
		for _, j := range b.jobs {
			if err := emit(j); err != nil {
				return err
			}
		}
		select {
		case spare <- b:
		default:
		}
	}
	return nil
}
