package schedule

import "errors"

// rows knows which rows are members.
type rows struct{}

func (r *rows) members(yield func(*Member, error) bool) {}

// Binding says which field a column supplies.
type Binding struct {
	Col         int    // 0 is A
	Heading     string // as the user wrote it, rows joined
	Cell        string // where it stands
	Field       string // "N_Ed", "M_y,Ed top"
	Unit        string // as used
	Combination string // named in the heading
}

// Scan finds the schedule in a file and understands its header, number format,
// settings and rows, without keeping the rows.
func Scan(src Source, opts Options) (*Plan, error) {
	return nil, errors.New("schedule: scanning is not there yet")
}
