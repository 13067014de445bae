package workbook

import (
	"archive/zip"
	"bytes"
	"image"
	"image/color"
	"image/png"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

// rich is a workbook with everything that offices put into one: what the
// library can make is made with it, and the rest is added by hand. Its schedule
// is that of simple, with members in rows 6 to 14.
func rich(t testing.TB) []byte {
	t.Helper()
	f := simple(t, 14)
	richCells(t, f)
	richSheets(t, f)
	return addByHand(t, packed(t, f))
}

func richCells(t testing.TB, f *excelize.File) {
	const s = "Columns"
	ok := func(err error) { t.Helper(); require.NoError(t, err) }
	yes, colour := true, "FF0000"
	ok(f.SetPanes(s, &excelize.Panes{Freeze: true, XSplit: 1, YSplit: 5, TopLeftCell: "B6", ActivePane: "bottomRight"}))
	ok(f.SetRowVisible(s, 7, false))
	ok(f.SetRowOutlineLevel(s, 9, 2))
	ok(f.SetColVisible(s, "D", false))
	ok(f.SetColWidth(s, "E", "E", 22))
	ok(f.SetColVisible(s, "H:XFD", false)) // the unused columns are hidden
	ok(f.AutoFilter(s, "A5:E14", nil))
	ok(f.SetDefinedName(&excelize.DefinedName{Name: "_xlnm.Print_Area", RefersTo: "Columns!$A$1:$E$14", Scope: s}))
	ok(f.SetDefinedName(&excelize.DefinedName{Name: "_xlnm.Print_Titles", RefersTo: "Columns!$3:$5", Scope: s}))
	ok(f.SetDefinedName(&excelize.DefinedName{Name: "Lengths", RefersTo: "Columns!$B$6:$B$14"}))
	ok(f.SetSheetProps(s, &excelize.SheetPropsOptions{TabColorRGB: &colour, OutlineSummaryBelow: &yes}))
	ok(f.SetCellFormula(s, "B15", "SUM(B6:B14)"))
	ok(f.SetCellHyperLink(s, "E6", "Notes!A1", "Location"))
	ok(f.SetCellRichText(s, "A14", []excelize.RichTextRun{{Text: "C"}, {Text: "14", Font: &excelize.Font{Bold: true}}}))
	ok(f.AddComment(s, excelize.Comment{Cell: "C6", Author: "A. Nyone", Text: "checked"}))
	validation := excelize.NewDataValidation(true)
	validation.SetSqref("E6:E14")
	ok(validation.SetDropList([]string{"203x203x46 UKC", "203x203x60 UKC"}))
	ok(f.AddDataValidation(s, validation))
	red, err := f.NewConditionalStyle(&excelize.Style{Font: &excelize.Font{Color: "9A0511"}})
	ok(err)
	ok(f.SetConditionalFormat(s, "C6:D14", []excelize.ConditionalFormatOptions{{Type: "cell", Criteria: ">", Value: "1000", Format: &red}}))
	ok(f.SetConditionalFormat(s, "B6:B14", []excelize.ConditionalFormatOptions{{Type: "data_bar", Criteria: "=", MinType: "min", MaxType: "max", BarColor: "#638EC6"}}))
	ok(f.InsertPageBreak(s, "A10"))
	ok(f.SetHeaderFooter(s, &excelize.HeaderFooterOptions{OddHeader: "&CDepot", OddFooter: "&P"}))
	ok(f.ProtectSheet(s, &excelize.SheetProtectionOptions{Password: "key", FormatCells: true, SelectLockedCells: true}))
}

func richSheets(t testing.TB, f *excelize.File) {
	ok := func(err error) { t.Helper(); require.NoError(t, err) }
	for _, name := range []string{"Notes", "Data", "Secret"} {
		_, err := f.NewSheet(name)
		ok(err)
	}
	ok(f.SetSheetVisible("Secret", false))
	ok(f.SetCellValue("Notes", "A1", "All loads factored."))
	for c, v := range []any{"Level", "Height"} {
		ok(f.SetCellValue("Data", cellName(c, 1), v))
		ok(f.SetCellValue("Data", cellName(c, 2), c+1))
	}
	ok(f.AddTable("Data", &excelize.Table{Range: "A1:B2", Name: "Levels"}))
	ok(f.AddChart("Notes", "C3", &excelize.Chart{Type: excelize.Col, Series: []excelize.ChartSeries{{Values: "Columns!$C$6:$C$14", Categories: "Columns!$A$6:$A$14"}}}))
	img := image.NewGray(image.Rect(0, 0, 8, 8))
	img.Set(3, 3, color.White)
	var buf bytes.Buffer
	ok(png.Encode(&buf, img))
	ok(f.AddPictureFromBytes("Columns", "D1", &excelize.Picture{Extension: ".png", File: buf.Bytes()}))
	ok(f.AddFormControl("Notes", excelize.FormControl{Cell: "A5", Type: excelize.FormControlButton, Text: "Go"}))
	ok(f.SetDocProps(&excelize.DocProperties{Title: "Depot", Creator: "Office"}))
	ok(f.SetCalcProps(&excelize.CalcPropsOptions{}))
}

// addByHand adds parts that the library does not make: macros, custom XML, a
// link to another workbook, printer settings, threaded comments, and extensions
// inside the sheet.
func addByHand(t testing.TB, data []byte) []byte {
	t.Helper()
	p := unpack(t, data)
	const office = "http://schemas.openxmlformats.org/officeDocument/2006/relationships/"
	rel := func(part, id, kind, target string) {
		p[part] = insertBefore(p[part], "</Relationships>", `<Relationship Id="`+id+`" Type="`+kind+`" Target="`+target+`"/>`)
	}
	kind := func(part, kind string) {
		p["[Content_Types].xml"] = insertBefore(p["[Content_Types].xml"], "</Types>", `<Override PartName="/`+part+`" ContentType="`+kind+`"/>`)
	}
	p["[Content_Types].xml"] = strings.Replace(p["[Content_Types].xml"], workbookTypes[".xlsx"], workbookTypes[".xlsm"], 1)
	p["xl/vbaProject.bin"] = "\xd0\xcf\x11\xe0 macros \x00\x01\x02"
	kind("xl/vbaProject.bin", "application/vnd.ms-office.vbaProject")
	rel("xl/_rels/workbook.xml.rels", "rId90", "http://schemas.microsoft.com/office/2006/relationships/vbaProject", "vbaProject.bin")
	p["customXml/item1.xml"] = `<job xmlns="urn:office:job"><number>4711</number></job>`
	rel("_rels/.rels", "rId91", office+"customXml", "customXml/item1.xml")
	p["xl/externalLinks/externalLink1.xml"] = `<externalLink xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"/>`
	kind("xl/externalLinks/externalLink1.xml", "application/vnd.openxmlformats-officedocument.spreadsheetml.externalLink+xml")
	rel("xl/_rels/workbook.xml.rels", "rId92", office+"externalLink", "externalLinks/externalLink1.xml")
	p["xl/printerSettings/printerSettings1.bin"] = "printer \x00\xff"
	kind("xl/printerSettings/printerSettings1.bin", "application/vnd.openxmlformats-officedocument.spreadsheetml.printerSettings")
	p["xl/threadedComments/threadedComment1.xml"] = `<ThreadedComments xmlns="http://schemas.microsoft.com/office/spreadsheetml/2018/threadedcomments"/>`
	kind("xl/threadedComments/threadedComment1.xml", "application/vnd.ms-excel.threadedcomments+xml")
	sheetRels := "xl/worksheets/_rels/sheet1.xml.rels"
	rel(sheetRels, "rId93", office+"printerSettings", "../printerSettings/printerSettings1.bin")
	rel(sheetRels, "rId94", "http://schemas.microsoft.com/office/2017/10/relationships/threadedComment", "../threadedComments/threadedComment1.xml")

	book := p["xl/workbook.xml"]
	book = strings.Replace(book, "<workbookPr ", `<fileSharing readOnlyRecommended="1"/><workbookPr codeName="ThisWorkbook" `, 1)
	book = insertBefore(book, "</workbook>", `<extLst><ext uri="{140A7094-0E35-4892-8432-C4D2E57EDEB5}" xmlns:x15="http://schemas.microsoft.com/office/spreadsheetml/2010/11/main"><x15:workbookPr chartTrackingRefBase="1"/></ext></extLst>`)
	p["xl/workbook.xml"] = strings.Replace(book, "<calcPr ", `<calcPr iterate="1" iterateCount="7" `, 1)

	sheet := p["xl/worksheets/sheet1.xml"]
	sheet = strings.Replace(sheet, "<row r=\"6\"", `<!-- kept --><row spans="1:5" x14ac:dyDescent="0.25" xmlns:x14ac="http://schemas.microsoft.com/office/spreadsheetml/2009/9/ac" r="6"`, 1)
	sheet = insertBefore(sheet, "<autoFilter", `<protectedRanges><protectedRange name="Open" sqref="A6:A14"/></protectedRanges><scenarios current="0"><scenario name="S" locked="1" count="1"><inputCells r="B6" val="3"/></scenario></scenarios>`)
	p["xl/worksheets/sheet1.xml"] = sheet
	styles := p["xl/styles.xml"]
	p["xl/styles.xml"] = insertBefore(styles, "</styleSheet>", `<extLst><ext uri="{EB79DEF2-80B8-43e5-95BD-54CBDDF9020C}" xmlns:x14="http://schemas.microsoft.com/office/spreadsheetml/2009/9/main"><x14:slicerStyles defaultSlicerStyle="SlicerStyleLight1"/></ext></extLst>`)
	return p.bytes(t)
}

// unpack reads a package into parts.
func unpack(t testing.TB, data []byte) parts {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(data), int64(len(data)))
	require.NoError(t, err)
	p := parts{}
	for _, f := range z.File {
		r, err := f.Open()
		require.NoError(t, err)
		b, err := io.ReadAll(r)
		require.NoError(t, err)
		p[f.Name] = string(b)
	}
	return p
}

// ownSheets are sheets of the project's own with all that they can hold.
func ownSheets() []Sheet {
	red := Look{Role: Fails}
	return []Sheet{
		{
			Name:   "Summary",
			Rows:   [][]Cell{{{Value: "Summary", Look: Look{Role: Title}}}, {{Value: "Members", Look: Look{Role: Label}}, {Formula: "COUNTA(Columns!A6:A14)"}}, {{Value: "Go to the schedule", Link: "Columns!A6"}}},
			Widths: []float64{24, 12}, FreezeRows: 1, RepeatRows: 1, PagesWide: 1, TabColour: "2F4858", Footer: "Depot & yard",
			Charts: []Chart{{Cell: "D2", Chart: &excelize.Chart{Type: excelize.Bar, Series: []excelize.ChartSeries{{Values: "Columns!$C$6:$C$14"}}}}},
		},
		{
			Name: "Sizes used",
			Rows: [][]Cell{{{Value: "Section", Look: Look{Role: Heading}}, {Value: "Number", Look: Look{Role: Heading, Align: Right}}},
				{{Value: "203x203x60 UKC"}, {Value: 4, Note: "four\nof them"}}, {{Value: " padded \n "}, {Value: true}}},
			Merges: []string{"A5:B5"}, Heights: map[int]float64{1: 30}, Filter: "A1:B3", Landscape: true,
			Rules:       []Rule{{Range: "B2:B3", Look: &red, Options: []excelize.ConditionalFormatOptions{{Type: "cell", Criteria: ">", Value: "3"}}}},
			Validations: []Validation{{Range: "A2:A3", Allowed: []string{"a", "b"}, PromptTitle: "Section", Prompt: "Choose one"}},
		},
	}
}

func richBlock() Block {
	b := simpleBlock(14)
	b.Header = schedule.Header{First: 3, Last: 4, UnitRow: 5, Width: 5}
	return b
}
