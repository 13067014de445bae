package main

import (
	"fmt"
	"io"
	"os"

	"golang.org/x/term"
)

// screenWidth is the number of characters that a table may take.
const screenWidth = 100

// console is what a command reads from and speaks to: results go to out,
// everything said to a person to err.
type console struct {
	in       io.Reader
	out, err io.Writer
	terminal bool // err is a terminal: progress may be shown
	screen   bool // out is a terminal: a person reads the results there
	colour   bool // err takes colours
	quiet    bool // errors alone are said
}

// systemConsole is the console of this process.
func systemConsole() *console {
	terminal := term.IsTerminal(int(os.Stderr.Fd()))
	return &console{
		in: os.Stdin, out: os.Stdout, err: os.Stderr,
		terminal: terminal,
		screen:   term.IsTerminal(int(os.Stdout.Fd())),
		colour:   terminal && os.Getenv("NO_COLOR") == "" && os.Getenv("TERM") != "dumb",
	}
}

// say writes a line to the person, unless they asked for quiet.
func (c *console) say(format string, args ...any) {
	if !c.quiet {
		fmt.Fprintf(c.err, format+"\n", args...)
	}
}

// fail says why the program ends. It is said even when quiet.
func (c *console) fail(err error) { fmt.Fprintf(c.err, "stanchion: %v\n", err) }

// strong returns s in bold where the terminal can, for what must not be missed.
func (c *console) strong(s string) string {
	if !c.colour {
		return s
	}
	return "\x1b[1m" + s + "\x1b[0m"
}
