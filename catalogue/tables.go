package catalogue

import (
	"bytes"
	"embed"
	"fmt"
	"sync"

	"github.com/gocarina/gocsv"
)

//go:embed tables/*.csv
var tables embed.FS

// row is one line of any of the tables; a table fills the columns it has.
type row struct {
	Designation string  `csv:"designation"`
	Family      string  `csv:"family"`
	Standard    string  `csv:"standard"`
	Nominal     string  `csv:"nominal"`
	Finish      string  `csv:"finish"`
	H           float64 `csv:"h_mm"`
	B           float64 `csv:"b_mm"`
	Tw          float64 `csv:"tw_mm"`
	Tf          float64 `csv:"tf_mm"`
	R           float64 `csv:"r_mm"`
	D           float64 `csv:"d_mm"`
	T           float64 `csv:"t_mm"`
	R1          float64 `csv:"r1_mm"`
	R2          float64 `csv:"r2_mm"`
	Mass        float64 `csv:"mass_kg_m"`
}

// Default returns the embedded catalogue, read and computed once.
var Default = sync.OnceValue(read)

func read() *Catalogue {
	var sections []*Section
	for _, file := range []string{"i_sections", "channels", "hollow_circular", "hollow_square", "hollow_rectangular", "angles"} {
		data, err := tables.ReadFile("tables/" + file + ".csv")
		if err != nil {
			panic(err) // the tables are part of the program
		}
		var rows []row
		if err := gocsv.Unmarshal(bytes.NewReader(data), &rows); err != nil {
			panic(fmt.Errorf("%s.csv: %w", file, err))
		}
		for i := range rows {
			sections = append(sections, rows[i].section())
		}
	}
	return newCatalogue(sections)
}

// section builds a section of the family's shape with its properties.
func (r *row) section() *Section {
	s := &Section{
		Designation: r.Designation, Family: r.Family, Standard: r.Standard, Nominal: r.Nominal,
		H: r.H, B: r.B, Tw: r.Tw, Tf: r.Tf, R: r.R, Mass: r.Mass,
	}
	switch r.Finish {
	case "hot":
		s.Finish = HotFinished
	case "cold":
		s.Finish = ColdFormed
	}
	s.Shape = families[r.Family].shape
	switch s.Shape {
	case ShapeCHS:
		s.H, s.B, s.Tw, s.Tf = r.D, r.D, r.T, r.T
	case ShapeRHS:
		s.Tw, s.Tf = r.T, r.T
		s.R, s.R2 = cornerRadii(s.Finish, r.T)
	case ShapeAngle:
		s.Tw, s.Tf, s.R, s.R2 = r.T, r.T, r.R1, r.R2
	}
	s.compute()
	return s
}

// compute fills in the properties from the dimensions.
func (s *Section) compute() {
	switch s.Shape {
	case ShapeI:
		s.Properties = iProperties(s)
	case ShapeChannel:
		s.Properties = channelProperties(s)
	case ShapeCHS:
		s.Properties = chsProperties(s)
	case ShapeRHS:
		s.Properties = rhsProperties(s)
	case ShapeAngle:
		s.Properties = angleProperties(s)
	}
}
