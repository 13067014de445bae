package main

import (
	"time"

	"github.com/schollz/progressbar/v3"
)

// slowRun is the number of members from which a run is worth watching.
const slowRun = 20_000

// progress shows how far a long run is, on a terminal alone.
type progress struct {
	bar     *progressbar.ProgressBar
	pending int
}

func newProgress(con *console, members int) *progress {
	p := &progress{}
	if con.terminal && !con.quiet && members >= slowRun {
		p.bar = progressbar.NewOptions(members,
			progressbar.OptionSetWriter(con.err),
			progressbar.OptionSetDescription("designing"),
			progressbar.OptionShowCount(),
			progressbar.OptionSetWidth(30),
			progressbar.OptionThrottle(100*time.Millisecond),
			progressbar.OptionClearOnFinish(),
			progressbar.OptionEnableColorCodes(false),
		)
	}
	return p
}

// add counts one member. The bar is told of every thousandth.
func (p *progress) add() {
	if p.bar == nil {
		return
	}
	if p.pending++; p.pending == 1000 {
		p.bar.Add(p.pending)
		p.pending = 0
	}
}

// done takes the bar off the screen.
func (p *progress) done() {
	if p.bar != nil {
		p.bar.Clear()
	}
}
