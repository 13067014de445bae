package schedule

// Earlier is what an earlier run wrote into a row.
type Earlier struct {
	Section, Grade, Status string
	Utilisation            float64
}

func (e *Earlier) take(name string, cell *Cell, decimal byte) {
	if cell.empty() {
		return
	}
	switch name {
	case "section":
		e.Section = cell.text()
	case "grade":
		e.Grade = cell.text()
	case "status":
		e.Status = cell.text()
	case "utilisation":
		e.Utilisation = cell.Number
		if cell.Kind == Text {
			e.Utilisation, _, _ = splitNumber(cell.Text, decimal)
		}
	}
}
