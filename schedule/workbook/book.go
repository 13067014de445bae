package workbook

import (
	"io"
	"strings"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// Book is a workbook open for reading. It is a schedule.Source.
type Book struct {
	name string
	file io.Closer
	data io.ReaderAt
	size int64
	pkg  *opc.Package

	main     string          // name of the workbook part
	root     *markup.Element // of it
	doc      []byte
	rels     []opc.Rel // of it
	sheets   []*sheet
	date1904 bool

	strings *sharedStrings // nil until asked for
	formats []format       // by style id, nil until asked for
	calc    *calculator    // nil until asked for
	dates   *dateShower    // nil until asked for
}

var _ schedule.Source = (*Book)(nil)

// sheet is one sheet of the workbook, in its order.
type sheet struct {
	name   string
	part   string // name of its part
	grid   bool   // it holds cells: no chart, dialogue or macro sheet
	hidden bool
	own    string // what it is to the program where an earlier run made it

	layout *layout // nil until asked for
	extent extent  // what the last full reading saw
}

// Name returns the file's name as given.
func (b *Book) Name() string { return b.name }

// Close closes the file.
func (b *Book) Close() error {
	if b.calc != nil {
		b.calc.close()
	}
	if b.file == nil {
		return nil
	}
	return b.file.Close()
}

// load reads what every use needs: the list of sheets.
func (b *Book) load() error {
	var err error
	if b.main, err = b.pkg.Main(); err != nil {
		return err
	}
	if b.root, b.doc, err = b.pkg.Tree(b.main); err != nil {
		return err
	}
	if b.rels, err = b.pkg.Rels(b.main); err != nil {
		return err
	}
	b.date1904 = isTrue(b.root.Child("workbookPr").Attr("date1904"))
	for _, e := range b.root.Child("sheets").All("sheet") {
		b.sheets = append(b.sheets, b.sheet(e))
	}
	b.findOwn()
	if len(b.Sheets()) == 0 {
		return refuse(b.name, "holds no visible sheet with cells", "give the workbook that holds the schedule")
	}
	return nil
}

func (b *Book) sheet(e *markup.Element) *sheet {
	s := &sheet{name: e.Attr("name")}
	state := e.Attr("state")
	s.hidden = state == "hidden" || state == "veryHidden"
	if r := b.rel(relID(e)); r != nil {
		s.part = r.Target
		s.grid = r.Is("worksheet")
	}
	return s
}

// relID returns the id of the relationship that an element names. Its prefix
// is the document's own choice.
func relID(e *markup.Element) string {
	return e.Attr("id")
}

func (b *Book) rel(id string) *opc.Rel {
	for i := range b.rels {
		if b.rels[i].ID == id {
			return &b.rels[i]
		}
	}
	return nil
}

// relOf returns the first relationship of the workbook of that kind.
func (b *Book) relOf(kind string) *opc.Rel {
	for i := range b.rels {
		if b.rels[i].Is(kind) && !b.rels[i].Outside {
			return &b.rels[i]
		}
	}
	return nil
}

func isTrue(attr string) bool { return attr == "1" || attr == "true" || attr == "on" }

// Sheets names the visible sheets that hold cells, in the order of the
// workbook, without those that an earlier run of the program added.
func (b *Book) Sheets() []string {
	return b.names(func(s *sheet) bool { return !s.hidden && s.own == "" })
}

// HiddenSheets names the hidden sheets that hold cells. They are read when
// asked for by name.
func (b *Book) HiddenSheets() []string {
	return b.names(func(s *sheet) bool { return s.hidden && s.own == "" })
}

// OwnSheet names the sheet that an earlier run of the program added as what is
// asked for, under whatever name it now has; "": none.
func (b *Book) OwnSheet(what string) string {
	for _, name := range b.names(func(s *sheet) bool { return s.own == what }) {
		return name
	}
	return ""
}

func (b *Book) names(keep func(*sheet) bool) []string {
	var out []string
	for _, s := range b.sheets {
		if s.grid && keep(s) {
			out = append(out, s.name)
		}
	}
	return out
}

// find returns the sheet of that name, whatever its case, nil where there is
// none that holds cells.
func (b *Book) find(name string) *sheet {
	for _, s := range b.sheets {
		if s.grid && s.name == name {
			return s
		}
	}
	for _, s := range b.sheets {
		if s.grid && strings.EqualFold(s.name, name) {
			return s
		}
	}
	return nil
}

// Where names a cell: "Columns!F12".
func (b *Book) Where(sheet string, row, col int) string {
	return sheet + "!" + cellName(col, row)
}

// HiddenColumns gives the columns (0 is A) that a sheet hides.
func (b *Book) HiddenColumns(name string) map[int]bool {
	s := b.find(name)
	if s == nil {
		return nil
	}
	l, err := b.layoutOf(s)
	if err != nil {
		return nil // reading its rows will say why
	}
	return l.hidden
}
