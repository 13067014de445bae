package main

import (
	"context"
	"errors"

	"stanchion/design"
)

// The exit statuses, which other programs rely on.
const (
	statusPasses      = 0   // every member passes
	statusFails       = 1   // finished; a member fails or has no section
	statusNotRead     = 2   // finished; a row could not be read
	statusNothing     = 3   // nothing written
	statusInterrupted = 130 // stopped by the user; nothing written
)

// exitStatuses is what the help of every command that designs says of them.
const exitStatuses = `Exit status:
  0    every member passes
  1    finished; a member fails or has no section
  2    finished; a row could not be read
  3    nothing written: bad usage, unreadable file, no header, two headers for
       one field, no members, or an output that cannot be written
  130  interrupted; nothing written`

// plainStatuses is the same for the commands that design nothing.
const plainStatuses = `Exit status:
  0    done
  3    nothing written: bad usage, unreadable file, or an output that cannot be
       written
  130  interrupted; nothing written`

// finished is how a run ends that wrote its results and has more to say than
// that all is well. It is no failure of the program, and nothing is printed.
type finished struct{ status int }

func (f *finished) Error() string { return "finished" }

// exitStatus is the one place that turns how a command ended into an exit
// status.
func exitStatus(err error) int {
	var f *finished
	switch {
	case err == nil:
		return statusPasses
	case errors.As(err, &f):
		return f.status
	case errors.Is(err, context.Canceled):
		return statusInterrupted
	}
	return statusNothing
}

// verdict returns how a run ends whose members have these outcomes.
func verdict(count *[4]int) error {
	switch {
	case count[design.NotRead] > 0:
		return &finished{statusNotRead}
	case count[design.Fails]+count[design.NoSection] > 0:
		return &finished{statusFails}
	}
	return nil
}
