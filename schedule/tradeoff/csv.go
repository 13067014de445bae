package tradeoff

import (
	"encoding/csv"
	"io"
	"strconv"
	"strings"

	"stanchion/design"
)

func (t *Table) csvHeader() []string {
	amount := [...]string{design.ByMass: "steel_t", design.ByCost: "cost", design.ByCarbon: "carbon_t"}[t.objective]
	return []string{"sizes", amount, "above_least", "saves", "proven", "gap", "sections"}
}

// IsCSV reports whether the first line of a file is that of a list written by
// WriteCSV.
func IsCSV(line string) bool {
	line = strings.TrimRight(strings.ReplaceAll(line, ";", ","), "\r\n")
	return strings.HasPrefix(line, "sizes,") && strings.HasSuffix(line, ",above_least,saves,proven,gap,sections")
}

// WriteCSV writes a line for each number of sizes and a last one, "any", for
// any number. With a decimal comma the columns are parted by semicolons.
func (t *Table) WriteCSV(w io.Writer, decimal byte) error {
	out := csv.NewWriter(w)
	out.UseCRLF = true
	if decimal == ',' {
		out.Comma = ';'
	}
	number := func(x float64, decimals int) string {
		return strings.Replace(strconv.FormatFloat(x, 'f', decimals, 64), ".", string(rune(decimal)), 1)
	}
	write := func(name string, l *Line) {
		record := []string{name, "", "", "", strconv.FormatBool(l.Proven), "", strings.Join(l.Sections, "; ")}
		if l.Served {
			record[1], record[2], record[5] = number(l.Amount, t.Decimals()+3), number(l.Above, 6), number(l.Gap, 6)
		}
		if l.Saves > 0 {
			record[3] = number(l.Saves, t.Decimals()+3)
		}
		out.Write(record)
	}
	out.Write(t.csvHeader())
	for i := range t.Lines {
		write(strconv.Itoa(t.Lines[i].Most), &t.Lines[i])
	}
	write("any", &t.Any)
	out.Flush()
	return out.Error()
}
