package catalogue

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"github.com/gocarina/gocsv"
	"golang.org/x/text/encoding"
	"golang.org/x/text/encoding/charmap"
	utf "golang.org/x/text/encoding/unicode"
	"golang.org/x/text/transform"
)

// stockRow is one line of a stock list: a name, or a section's own dimensions.
type stockRow struct {
	line int

	Name     string `csv:"section"`
	Family   string `csv:"family"`
	Finish   string `csv:"finish"`
	H        string `csv:"h_mm"`
	B        string `csv:"b_mm"`
	Tw       string `csv:"tw_mm"`
	Tf       string `csv:"tf_mm"`
	R        string `csv:"r_mm"`
	D        string `csv:"d_mm"`
	T        string `csv:"t_mm"`
	R1       string `csv:"r1_mm"`
	R2       string `csv:"r2_mm"`
	Mass     string `csv:"mass_kg_m"`
	Grade    string `csv:"grade"`
	Number   string `csv:"number"`
	LengthM  string `csv:"length_m"`
	LengthMM string `csv:"length_mm"`
}

// headings are the words for a column, letters and digits alone, lower case.
var headings = map[string][]string{
	"section":   {"section", "sections", "sectionsize", "sectionname", "sectiondesignation", "designation", "size", "serialsize", "name", "profile", "steelsection"},
	"family":    {"family", "sectionfamily", "type", "sectiontype"},
	"finish":    {"finish"},
	"h_mm":      {"hmm", "depthmm"},
	"b_mm":      {"bmm", "widthmm"},
	"tw_mm":     {"twmm", "webthicknessmm"},
	"tf_mm":     {"tfmm", "flangethicknessmm"},
	"r_mm":      {"rmm", "rootradiusmm"},
	"d_mm":      {"dmm", "diametermm"},
	"t_mm":      {"tmm", "thicknessmm", "wallthicknessmm"},
	"r1_mm":     {"r1mm"},
	"r2_mm":     {"r2mm", "toeradiusmm"},
	"mass_kg_m": {"masskgm", "masskgpm", "kgm"},
	"grade":     {"grade", "steelgrade"},
	"number":    {"number", "nooff", "qty", "quantity", "pieces"},
	"length_m":  {"lengthm"},
	"length_mm": {"lengthmm"},
}

// unitless are headings of dimensions that leave their unit open.
var unitless = map[string]string{
	"h": "h_mm", "depth": "h_mm", "b": "b_mm", "width": "b_mm", "tw": "tw_mm", "tf": "tf_mm", "r": "r_mm", "d": "d_mm",
	"diameter": "d_mm", "t": "t_mm", "thickness": "t_mm", "r1": "r1_mm", "r2": "r2_mm", "length": "length_m",
}

var columnByHeading = func() map[string]string {
	byHeading := map[string]string{}
	for column, words := range headings {
		for _, w := range words {
			byHeading[w] = column
		}
	}
	return byHeading
}()

// headingKey is a heading's letters and digits. One that holds a separator is
// a line that was not parted.
func headingKey(cell string) string {
	if strings.ContainsAny(cell, ",;\t") {
		return ""
	}
	return strings.Map(func(r rune) rune {
		if unicode.IsLetter(r) || unicode.IsDigit(r) {
			return unicode.ToLower(r)
		}
		return -1
	}, cell)
}

// stockTable is the parted text: every record with its line.
type stockTable struct {
	records [][]string
	lines   []int
	header  int // index of the header's record, -1: none
}

const titleLines = 10 // records above a header that may be titles

// stockRows reads the lines of a list.
func (c *Catalogue) stockRows(data []byte) ([]stockRow, error) {
	text, err := decode(data)
	if err != nil {
		return nil, err
	}
	table := partText(text)
	if table.header < 0 {
		return c.bareList(text)
	}
	columns, err := table.columns()
	if err != nil {
		return nil, err
	}
	records, lines := table.records[table.header+1:], table.lines[table.header+1:]
	for i, record := range records {
		for _, cell := range record[min(len(record), len(columns)):] {
			if cell != "" {
				return nil, fmt.Errorf("line %d has %d fields where the header has %d: put a name or number with a comma in quotes, or part the columns by semicolons", lines[i], len(record), len(columns))
			}
		}
	}
	var rows []stockRow
	if err := gocsv.UnmarshalCSV(&recordReader{append([][]string{columns}, records...)}, &rows); err != nil && !errors.Is(err, gocsv.ErrEmptyCSVFile) {
		return nil, err
	}
	for i := range rows {
		rows[i].line = lines[i]
	}
	return rows, nil
}

// decode brings a text to UTF-8 with plain line ends.
func decode(data []byte) (string, error) {
	var plain encoding.Encoding = utf.UTF8
	if !utf8.Valid(data) {
		plain = charmap.Windows1252
	}
	text, _, err := transform.Bytes(utf.BOMOverride(plain.NewDecoder()), data)
	if err != nil {
		return "", err
	}
	return strings.ReplaceAll(strings.ReplaceAll(string(text), "\r\n", "\n"), "\r", "\n"), nil
}

// partText parts the text by the separator under which a header has the most
// known headings.
func partText(text string) stockTable {
	best, most := stockTable{header: -1}, 0
	for _, comma := range []rune{'\t', ';', ','} {
		t := stockTable{header: -1}
		t.read(text, comma)
		for i, record := range t.records[:min(titleLines, len(t.records))] {
			known := 0
			for _, cell := range record {
				if columnByHeading[headingKey(cell)] != "" {
					known++
				}
			}
			if known > most {
				t.header = i
				best, most = t, known
			}
		}
	}
	return best
}

func (t *stockTable) read(text string, comma rune) {
	reader := csv.NewReader(strings.NewReader(text))
	reader.Comma = comma
	reader.FieldsPerRecord = -1
	reader.LazyQuotes = true
	for {
		record, err := reader.Read()
		if err != nil {
			return // the end: lazy quotes leave nothing else to complain of
		}
		line, _ := reader.FieldPos(0)
		for i := range record {
			record[i] = strings.TrimSpace(record[i])
		}
		t.records, t.lines = append(t.records, record), append(t.lines, line)
	}
}

// columns names the columns of the header; those that are not known are "". A
// dimension without a unit is passed over where a name makes it needless.
func (t *stockTable) columns() ([]string, error) {
	header := t.records[t.header]
	named := slices.ContainsFunc(header, func(cell string) bool { return columnByHeading[headingKey(cell)] == "section" })
	columns := make([]string, len(header))
	for i, cell := range header {
		k := headingKey(cell)
		if with, open := unitless[k]; open && (!named || k == "length") {
			return nil, fmt.Errorf("line %d: the heading %q has no unit: call it %s", t.lines[t.header], cell, with)
		}
		columns[i] = columnByHeading[k]
		if at := slices.Index(columns[:i], columns[i]); at >= 0 && columns[i] != "" {
			return nil, fmt.Errorf("line %d: the headings %q and %q both mean %s: rename one", t.lines[t.header], header[at], cell, columns[i])
		}
	}
	return columns, nil
}

// bareList reads a list of names without a header, one a line.
func (c *Catalogue) bareList(text string) ([]stockRow, error) {
	var rows []stockRow
	for i, line := range strings.Split(text, "\n") {
		if name := strings.Trim(line, " \t\";,"); name != "" {
			rows = append(rows, stockRow{line: i + 1, Name: name})
		}
	}
	for i := range rows {
		if _, err := c.Find(rows[i].Name, FindOptions{}); err == nil {
			return rows, nil
		} else if i == titleLines {
			break
		}
	}
	return nil, errors.New("no heading is known, and the lines are no names of sections")
}

// recordReader gives records to gocsv.
type recordReader struct{ records [][]string }

func (r *recordReader) Read() ([]string, error) {
	if len(r.records) == 0 {
		return nil, io.EOF
	}
	record := r.records[0]
	r.records = r.records[1:]
	return record, nil
}

func (r *recordReader) ReadAll() ([][]string, error) {
	all := r.records
	r.records = nil
	return all, nil
}
