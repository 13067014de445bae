package calcsheet

import (
	"slices"
	"strconv"
	"strings"

	"stanchion/design/working"
	"stanchion/design/working/formula"
)

// resultBox sets a number with its unit.
func resultBox(n formula.Number, u working.Unit) box {
	n.Exponent = 0
	b := setNumber(n)
	if u.Name == "" {
		return b
	}
	if power, name, ok := strings.Cut(u.Name, " "); ok && strings.HasPrefix(power, "×") {
		return row(b, unitBox(power), gap(unitGap), unitBox(name))
	}
	return row(b, gap(unitGap), unitBox(u.Name))
}

// unitBox sets a unit; its raised figures are characters of their own.
func unitBox(name string) box {
	var list []box
	rest := name
	for rest != "" {
		i := strings.IndexAny(rest, "²³⁴⁶⁹")
		if i < 0 {
			list = append(list, textBox(rest, upright, 1))
			break
		}
		figure := []rune(rest[i:])[0]
		plain := strconv.Itoa(slices.Index([]rune("⁰¹²³⁴⁵⁶⁷⁸⁹"), figure))
		list = append(list, raised(textBox(rest[:i], upright, 1), textBox(plain, upright, scriptSize)))
		rest = rest[i+len(string(figure)):]
	}
	return row(list...)
}
