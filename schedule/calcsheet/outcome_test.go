package calcsheet

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// Who reads the working of a length that has its section from the one below
// must find that there.
func TestNotesOfTheChoiceStandBelowTheChecks(t *testing.T) {
	s := sheetOf(t, &examples[0])
	s.Notes = []string{"of the working"}
	s.Result.Notes = []string{"of the working", `stack "A1": the next lighter section fails at C1 (Columns!A9)`}
	s.Column.Notes = []string{"the row is hidden"}
	lines := beyond(s)
	assert.Equal(t, []string{`Note: stack "A1": the next lighter section fails at C1 (Columns!A9).`, "Note: the row is hidden."}, lines[len(lines)-2:])
}
