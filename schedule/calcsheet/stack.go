package calcsheet

import "stanchion/design/working"

// Stack is a column line: its lengths, the lowest first.
type Stack struct {
	Name    string
	Lengths []*working.Sheet
}

func (d *document) stackPages(stacks []*Stack) {}
