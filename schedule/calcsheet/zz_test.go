package calcsheet

import (
	"os"
	"testing"

	"stanchion/design/ec3"
	"stanchion/design/working"
)

func TestZZ(t *testing.T) {
	var sheets []*working.Sheet
	for i := range examples {
		sheets = append(sheets, sheetOf(t, &examples[i]))
	}
	uk, _ := ec3.NationalSet("UK")
	f, _ := os.Create("/tmp/sheet/zz.pdf")
	defer f.Close()
	p := &Project{Title: "Ottermere Depot", File: "ottermere-depot.xlsx", Sheet: "Columns", Program: "stanchion dev", Standard: "EN 1993-1-1:2005 + A1:2014", National: uk}
	if err := PDF(f, p, sheets, nil); err != nil {
		t.Fatal(err)
	}
}
