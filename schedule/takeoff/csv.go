package takeoff

import (
	"encoding/csv"
	"io"
	"strconv"
	"strings"
)

// csvHeader is the first line of the list: one line a row of a table, the
// tables one after the other and named in the first column. Each table adds up
// to the total.
var csvHeader = []string{
	"table", "family", "section", "grade", "from", "to", "piece_m", "pieces", "lengths", "length_m", "kg_m", "mass_kg", "painted_m2",
	"cost", "carbon_kg", "marks",
}

// WriteCSV writes the tables as one list, for other programs and for a
// spreadsheet. Every number has all its digits: grams, micrometres, mm2. With
// a decimal comma the columns are parted by semicolons.
func (t *TakeOff) WriteCSV(w io.Writer, decimal byte) error {
	l := csvList{w: csv.NewWriter(w), decimal: decimal, cost: t.HasCost(), carbon: t.HasCarbon()}
	l.w.UseCRLF = true
	if decimal == ',' {
		l.w.Comma = ';'
	}
	l.w.Write(csvHeader)
	for i := range t.Sections {
		s := &t.Sections[i]
		l.add(csvRow{table: "section", family: FamilyName(s.Section), section: s.Section.Name(), grade: s.Grade, pieces: s.Pieces, kgM: s.Section.Mass}, &s.Amounts)
	}
	for i := range t.Levels {
		v := &t.Levels[i]
		l.add(csvRow{table: "level", from: v.From, to: v.To}, &v.Amounts)
	}
	for i := range t.Families {
		f := &t.Families[i]
		l.add(csvRow{table: "family", family: f.Family, pieces: f.Pieces}, &f.Amounts)
	}
	for i := range t.Cuts {
		c := &t.Cuts[i]
		l.add(csvRow{
			table: "cut", family: FamilyName(c.Section), section: c.Section.Name(), grade: c.Grade, kgM: c.Section.Mass,
			piece: c.Length, pieces: c.Number, marks: strings.Join(c.Marks, "; "),
		}, &c.Amounts)
	}
	l.totals(t)
	for i := range t.LeftOut {
		o := &t.LeftOut[i]
		l.add(csvRow{table: "not counted", marks: o.String()}, &Amounts{})
	}
	l.w.Flush()
	return l.w.Error()
}

// csvList is the list being written.
type csvList struct {
	w            *csv.Writer
	decimal      byte
	cost, carbon bool
}

// csvRow is what a row says beside its amounts; 0 is a blank.
type csvRow struct {
	table, family, section, grade, from, to, marks string
	piece, pieces                                  int64
	kgM                                            float64
}

func (l *csvList) totals(t *TakeOff) {
	net := t.Net
	l.add(csvRow{table: "total", pieces: t.Pieces}, &net)
	connections, waste := t.Allowance()
	if connections.Mass > 0 {
		l.add(csvRow{table: "allowance for connections"}, &connections)
	}
	if waste.Mass > 0 {
		l.add(csvRow{table: "allowance for waste"}, &waste)
	}
	if gross := t.Gross(); gross.Mass > net.Mass {
		l.add(csvRow{table: "total with allowances", pieces: t.Pieces}, &gross)
	}
}

func (l *csvList) add(r csvRow, a *Amounts) {
	money, carbon := "", ""
	if l.cost {
		money = l.some(a.Cost, 6, 2)
	}
	if l.carbon {
		carbon = l.some(a.Carbon, 6, 3)
	}
	l.w.Write([]string{
		r.table, r.family, r.section, r.grade, r.from, r.to, l.some(r.piece, 6, 3), l.some(r.pieces, 0, 0),
		l.some(a.Lengths, 0, 0), l.some(a.Length, 6, 3), l.number(r.kgM), l.some(a.Mass, 3, 3), l.some(a.Area, 6, 3),
		money, carbon, r.marks,
	})
}

// some writes n parts of 10^places of a unit with all its digits and at least
// so many decimals; 0 is a blank.
func (l *csvList) some(n int64, places, least int) string {
	if n == 0 {
		return ""
	}
	return l.decimals(n, places, least)
}

// decimals writes n parts of 10^places of a unit with all its digits, and at
// least so many decimals.
func (l *csvList) decimals(n int64, places, least int) string {
	return decimals(n, places, least, l.decimal)
}

func (l *csvList) number(x float64) string {
	if x == 0 {
		return ""
	}
	return strings.Replace(strconv.FormatFloat(x, 'f', -1, 64), ".", string(l.decimal), 1)
}

// decimals writes n parts of 10^places of a unit, exactly, with at least so
// many decimals.
func decimals(n int64, places, least int, point byte) string {
	digits := strconv.FormatInt(n, 10)
	sign := ""
	if n < 0 {
		sign, digits = "-", digits[1:]
	}
	if pad := places + 1 - len(digits); pad > 0 {
		digits = strings.Repeat("0", pad) + digits
	}
	whole, part := digits[:len(digits)-places], digits[len(digits)-places:]
	for len(part) > least && part[len(part)-1] == '0' {
		part = part[:len(part)-1]
	}
	if part == "" {
		return sign + whole
	}
	return sign + whole + string(point) + part
}

// IsCSV reports whether the first line of a file is that of a list written by
// WriteCSV.
func IsCSV(line string) bool {
	line = strings.TrimRight(line, "\r\n")
	return line == strings.Join(csvHeader, ",") || line == strings.Join(csvHeader, ";")
}
