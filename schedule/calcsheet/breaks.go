package calcsheet

import (
	"strings"

	"stanchion/design/working/formula"
)

// pieces sets a formula as boxes between which a line may break.
func pieces(e formula.Expr) []box {
	switch e := e.(type) {
	case formula.Sum:
		return joined(setTerms(e, true))
	case formula.Product:
		return joined(setFactors(e, true))
	case formula.Call:
		return callPieces(e)
	}
	return []box{typeset(e)}
}

// joined puts every sign with the box behind it.
func joined(list []box) []box {
	var out []box
	var held []box
	for _, b := range list {
		held = append(held, b)
		if len(b.marks) == 1 && strings.ContainsAny(b.marks[0].text, "+−×") && len([]rune(b.marks[0].text)) == 1 || len(b.marks) == 0 {
			continue
		}
		out = append(out, row(held...))
		held = nil
	}
	return out
}

// callPieces breaks a function behind the commas of its arguments and inside
// the first of them.
func callPieces(e formula.Call) []box {
	if e.Name == "abs" {
		return []box{typeset(e)}
	}
	list := []box{textBox(e.Name+"(", upright, 1)}
	for i, a := range e.Args {
		parts := pieces(a)
		list[len(list)-1] = row(list[len(list)-1], parts[0])
		list = append(list, parts[1:]...)
		end := ", "
		if i == len(e.Args)-1 {
			end = ")"
		}
		list[len(list)-1] = row(list[len(list)-1], textBox(end, upright, 1))
		if i < len(e.Args)-1 {
			list = append(list, gap(0))
		}
	}
	return list
}
