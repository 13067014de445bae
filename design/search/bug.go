package search

import (
	"errors"
	"fmt"
	"runtime/debug"
	"sync"

	"stanchion/design"
)

// BugError is a defect of this program that one column brought to light: the
// column has no result, every other one stands.
type BugError struct {
	Mark, Cell string
	Value      any    // what was panicked with
	Stack      []byte // where
}

// Error names the column and the defect.
func (e *BugError) Error() string {
	return fmt.Sprintf("%s (%s): defect of this program, please report it: %v", e.Mark, e.Cell, e.Value)
}

// bugs collects the defects that workers meet.
type bugs struct {
	mu  sync.Mutex
	all []error
}

// catch, deferred, turns a panic over a column into its result, and keeps it.
func (b *bugs) catch(col *design.Column, res *design.Result) {
	if v := recover(); v != nil {
		b.keep(v, col, res)
	}
}

// catchAll does so for columns that are designed together.
func (b *bugs) catchAll(which []int, cols []design.Column, results []design.Result) {
	if v := recover(); v != nil {
		for _, i := range which {
			b.keep(v, &cols[i], &results[i])
		}
	}
}

func (b *bugs) keep(v any, col *design.Column, res *design.Result) {
	*res = design.Result{Status: design.NotRead, Notes: []string{
		fmt.Sprintf("defect of this program, please report it: %v", v),
	}}
	b.mu.Lock()
	defer b.mu.Unlock()
	b.all = append(b.all, &BugError{Mark: col.Mark, Cell: col.Cell, Value: v, Stack: debug.Stack()})
}

// err returns the defects as one error, nil if there were none.
func (b *bugs) err() error {
	b.mu.Lock()
	defer b.mu.Unlock()
	return errors.Join(b.all...)
}
