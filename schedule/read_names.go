package schedule

import (
	"fmt"
	"strings"
)

// nameCell reads a section, grade or family.
func (r *reader) nameCell(b *Binding, cell *Cell, v *value) *Problem {
	text := cell.text()
	id := nameCell{b.key.field, text}
	if name, ok := r.resolved[id]; ok {
		v.text = name
		return nil
	}
	name, err := r.resolve(b.key.field, text)
	if err != nil {
		return &Problem{What: fmt.Sprintf("%s is %q: %s", b.title(), text, err), Do: ""}
	}
	v.text = name
	if len(r.resolved) < remembered {
		id.text = strings.Clone(text)
		r.resolved[id] = name
	}
	return nil
}

// severalNames joins the families or grades of one cell.
const severalNames = "\x1f"

func (r *reader) resolve(f fieldName, text string) (string, error) {
	switch f {
	case sectionField:
		return text, nil // resolved with the member's families
	case familyField:
		list, err := parseFamilies(text)
		return strings.Join(list, severalNames), err
	default:
		list, err := r.grades(text)
		return strings.Join(list, severalNames), err
	}
}

// strengthName puts the S before a grade that is given by its strength alone,
// as in a column of numbers: 355.
func strengthName(s string) string {
	if len(s) == 3 && digitRun(s) == 3 {
		return "S" + s
	}
	return s
}

// grades reads one grade, or several between commas, strokes or spaces.
func (r *reader) grades(text string) ([]string, error) {
	var list []string
	for _, part := range strings.FieldsFunc(text, func(c rune) bool { return c == ',' || c == ';' || c == '/' || c == '|' }) {
		name, err := parseGrade(strengthName(trim(part)))
		if err == nil {
			list = append(list, name)
			continue
		}
		words := strings.Fields(part)
		if len(words) < 2 {
			return nil, err
		}
		for _, w := range words {
			name, wordErr := parseGrade(strengthName(w))
			if wordErr != nil {
				return nil, err
			}
			list = append(list, name)
		}
	}
	return list, nil
}
