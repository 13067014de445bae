package main

import (
	"encoding/csv"
	"encoding/json"
	"fmt"
	"io"
	"math"
	"path/filepath"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/catalogue"
)

// property is one property of a section as people read it.
type property struct {
	key      string // in CSV and JSON, with its unit
	symbol   string
	unit     string
	meaning  string
	decimals int // in the table; -1: four figures
	wide     bool
	of       func(*catalogue.Section) float64
}

// cm is the number of mm in a cm, raised to the power of the property.
const (
	cm2 = 1e2
	cm3 = 1e3
	cm4 = 1e4
	cm6 = 1e6
)

// properties in the order of section tables. Those that are wide stand in CSV,
// JSON and the full list of few sections alone: a screen has no room for them.
var properties = []property{
	{"mass_kg_m", "m", "kg/m", "mass per metre, nominal", 1, false, func(s *catalogue.Section) float64 { return s.Mass }},
	{"h_mm", "h", "mm", "overall depth", 1, false, func(s *catalogue.Section) float64 { return s.H }},
	{"b_mm", "b", "mm", "width", 1, false, func(s *catalogue.Section) float64 { return s.B }},
	{"tw_mm", "tw", "mm", "web, wall or leg thickness", 1, false, func(s *catalogue.Section) float64 { return s.Tw }},
	{"tf_mm", "tf", "mm", "flange, wall or leg thickness", 1, false, func(s *catalogue.Section) float64 { return s.Tf }},
	{"r_mm", "r", "mm", "root radius; outer corner radius", 1, true, func(s *catalogue.Section) float64 { return s.R }},
	{"A_cm2", "A", "cm2", "area", 1, false, func(s *catalogue.Section) float64 { return s.A / cm2 }},
	{"Iy_cm4", "Iy", "cm4", "second moment of area about y-y", -1, false, func(s *catalogue.Section) float64 { return s.Iy / cm4 }},
	{"Iz_cm4", "Iz", "cm4", "second moment of area about z-z", -1, false, func(s *catalogue.Section) float64 { return s.Iz / cm4 }},
	{"iy_cm", "iy", "cm", "radius of gyration about y-y", 2, false, func(s *catalogue.Section) float64 { return s.RadY / 10 }},
	{"iz_cm", "iz", "cm", "radius of gyration about z-z", 2, false, func(s *catalogue.Section) float64 { return s.RadZ / 10 }},
	{"iu_cm", "iu", "cm", "radius of gyration about u-u", 2, true, angleOnly(func(s *catalogue.Section) float64 { return s.RadU / 10 })},
	{"iv_cm", "iv", "cm", "radius of gyration about v-v", 2, true, angleOnly(func(s *catalogue.Section) float64 { return s.RadV / 10 })},
	{"Wel_y_cm3", "Wel,y", "cm3", "elastic modulus about y-y", -1, true, func(s *catalogue.Section) float64 { return s.WelY / cm3 }},
	{"Wel_z_cm3", "Wel,z", "cm3", "elastic modulus about z-z", -1, true, func(s *catalogue.Section) float64 { return s.WelZ / cm3 }},
	{"Wpl_y_cm3", "Wpl,y", "cm3", "plastic modulus about y-y", -1, true, func(s *catalogue.Section) float64 { return s.WplY / cm3 }},
	{"Wpl_z_cm3", "Wpl,z", "cm3", "plastic modulus about z-z", -1, true, func(s *catalogue.Section) float64 { return s.WplZ / cm3 }},
	{"It_cm4", "It", "cm4", "torsion constant", -1, false, func(s *catalogue.Section) float64 { return s.It / cm4 }},
	{"Iw_cm6", "Iw", "cm6", "warping constant", -1, true, func(s *catalogue.Section) float64 { return s.Iw / cm6 }},
	{"perimeter_m2_m", "", "m2/m", "painted surface per metre", 3, true, func(s *catalogue.Section) float64 { return s.Perimeter / 1000 }},
}

// angleOnly is a property that other shapes repeat from y-y and z-z.
func angleOnly(of func(*catalogue.Section) float64) func(*catalogue.Section) float64 {
	return func(s *catalogue.Section) float64 {
		if s.Shape != catalogue.ShapeAngle {
			return 0
		}
		return of(s)
	}
}

// text is the value for a screen; blank where the section has none.
func (p *property) text(s *catalogue.Section) string {
	v := p.of(s)
	switch {
	case v == 0:
		return ""
	case p.decimals < 0:
		return fourFigures(v)
	}
	return strconv.FormatFloat(v, 'f', p.decimals, 64)
}

// fourFigures rounds as section tables do: to four figures, without an
// exponent.
func fourFigures(v float64) string {
	return strconv.FormatFloat(toFigures(v, 4), 'f', max(0, 3-magnitude(v)), 64)
}

// exact is the value for another program: seven figures, which hide the last
// digits that processors may differ in. none is what stands for no value.
func (p *property) exact(s *catalogue.Section, none string) string {
	v := p.of(s)
	if v == 0 {
		return none
	}
	return strconv.FormatFloat(toFigures(v, 7), 'f', -1, 64)
}

// magnitude is the power of ten of the first figure.
func magnitude(v float64) int { return int(math.Floor(math.Log10(math.Abs(v)))) }

// toFigures rounds to a number of figures.
func toFigures(v float64, n int) float64 {
	text := strconv.FormatFloat(v, 'e', n-1, 64)
	rounded, err := strconv.ParseFloat(text, 64)
	if err != nil {
		panic(err) // it was just written
	}
	return rounded
}

const fewSections = 3 // so many or fewer are shown with every property

// writer returns how the list is written.
func (f *sectionsFlags) writer(c *cobra.Command) (func(io.Writer, []*catalogue.Section) error, error) {
	format := strings.ToLower(f.format)
	if !c.Flags().Changed("format") && f.output != "" {
		format = map[string]string{".csv": "csv", ".json": "json", ".jsonl": "json", ".ndjson": "json"}[strings.ToLower(filepath.Ext(f.output))]
	}
	switch format {
	case "table", "txt", "":
		return writeSectionTable, nil
	case "csv":
		return writeSectionCSV, nil
	case "json", "jsonl":
		return writeSectionJSON, nil
	}
	return nil, usage(c, "--format %s: give table, csv or json", f.format)
}

func writeSectionTable(w io.Writer, list []*catalogue.Section) error {
	var lines []string
	if len(list) <= fewSections {
		lines = fullList(list)
	} else {
		lines = shortList(list)
	}
	_, err := io.WriteString(w, strings.Join(lines, "\n")+"\n")
	return err
}

// shortList has one line a section.
func shortList(list []*catalogue.Section) []string {
	headings, units := []string{"Section"}, []string{""}
	for i := range properties {
		if p := &properties[i]; !p.wide {
			headings, units = append(headings, ">"+p.symbol), append(units, p.unit)
		}
	}
	t := newTable(headings...)
	t.add(units...)
	for _, s := range list {
		row := []string{s.Name()}
		for i := range properties {
			if p := &properties[i]; !p.wide {
				row = append(row, p.text(s))
			}
		}
		t.add(row...)
	}
	return append(t.lines(), "", fmt.Sprintf("%d sections", len(list)))
}

// fullList has one line a property and one column a section.
func fullList(list []*catalogue.Section) []string {
	headings := []string{"", "", ""}
	standard := []string{"standard", "", ""}
	for _, s := range list {
		headings, standard = append(headings, ">"+s.Name()), append(standard, s.Standard)
	}
	t := newTable(headings...)
	t.add(standard...)
	for i := range properties {
		p := &properties[i]
		row := []string{p.meaning, p.symbol, p.unit}
		filled := false
		for _, s := range list {
			v := p.text(s)
			row, filled = append(row, v), filled || v != ""
		}
		if filled {
			t.add(row...)
		}
	}
	return t.lines()
}

func writeSectionCSV(w io.Writer, list []*catalogue.Section) error {
	out := csv.NewWriter(w)
	header := []string{"section", "family", "standard", "finish"}
	for i := range properties {
		header = append(header, properties[i].key)
	}
	out.Write(header)
	for _, s := range list {
		row := []string{s.Name(), s.Family, s.Standard, finishName(s)}
		for i := range properties {
			row = append(row, properties[i].exact(s, ""))
		}
		out.Write(row)
	}
	out.Flush()
	return out.Error()
}

// writeSectionJSON writes one object a line, its keys in the order of the CSV.
func writeSectionJSON(w io.Writer, list []*catalogue.Section) error {
	var b strings.Builder
	for _, s := range list {
		fmt.Fprintf(&b, `{"section":%s,"family":%s,"standard":%s,"finish":%s`, quoted(s.Name()), quoted(s.Family), quoted(s.Standard), quoted(finishName(s)))
		for i := range properties {
			fmt.Fprintf(&b, `,"%s":%s`, properties[i].key, properties[i].exact(s, "null"))
		}
		b.WriteString("}\n")
	}
	_, err := io.WriteString(w, b.String())
	return err
}

func quoted(s string) string {
	b, err := json.Marshal(s)
	if err != nil {
		panic(err) // a string always marshals
	}
	return string(b)
}

// finishName names the finish of a hollow section; other shapes have none.
func finishName(s *catalogue.Section) string {
	switch s.Finish {
	case catalogue.HotFinished:
		return "hot finished"
	case catalogue.ColdFormed:
		return "cold formed"
	}
	return ""
}
