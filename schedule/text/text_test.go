package text

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule"
)

func open(t *testing.T, content string) *File {
	t.Helper()
	f, err := OpenReader(strings.NewReader(content), "loads.csv")
	require.NoError(t, err)
	t.Cleanup(func() { f.Close() })
	return f
}

func read(t *testing.T, f *File) *schedule.Schedule {
	t.Helper()
	s, err := schedule.Read(f, schedule.Options{National: ec3.NationalSet})
	require.NoError(t, err)
	return s
}

// annotate sizes nothing: it writes a result for every member, so that the
// writing can be looked at.
func annotate(t *testing.T, f *File) string {
	t.Helper()
	plan, err := schedule.Scan(f, schedule.Options{National: ec3.NationalSet})
	require.NoError(t, err)
	var out bytes.Buffer
	w, err := f.NewWriter(&out, plan, schedule.ResultColumns(schedule.ResultOptions{}))
	require.NoError(t, err)
	for m, err := range plan.Members() {
		require.NoError(t, err)
		r := design.Result{Section: "203x203x46 UKC", Grade: "S355", Utilisation: 0.8754, Mass: 184.4, MassPerM: 46.1}
		if len(m.Problems) > 0 {
			r = schedule.NotReadResult(m)
		}
		require.NoError(t, w.Write(m, &r))
	}
	require.NoError(t, w.Close())
	return out.String()
}

// few keeps of annotated lines the user's fields and some results.
func few(t *testing.T, out string, delim string) []string {
	t.Helper()
	var lines []string
	for _, l := range strings.Split(strings.ReplaceAll(out, "\r\n", "\n"), "\n") {
		if i := strings.Index(l, delim+"203x203x46 UKC"+delim); i >= 0 {
			l = l[:i] + delim + "..."
		}
		if i := strings.Index(l, delim+"Result: "); i >= 0 {
			l = l[:i] + delim + "..."
		}
		lines = append(lines, strings.TrimRight(l, delim))
	}
	return lines
}

func TestDialects(t *testing.T) {
	for name, content := range map[string]string{
		"comma":           "Mark,Length,N_Ed\nC1,3.6,1200.5\nC2,4.2,\"1,200\"\n",
		"semicolon":       "Mark;Length;N_Ed\nC1;3,6;1200,5\nC2;4,2;1.200\n",
		"tab":             "Mark\tLength\tN_Ed\nC1\t3.6\t1200.5\nC2\t4.2\t1,200\n",
		"semicolon point": "Mark;Length;N_Ed\nC1;3.6;1200.5\nC2;4.2;1'200\n",
		"CRLF":            "Mark,Length,N_Ed\r\nC1,3.6,1200.5\r\nC2,4.2,1200\r\n",
		"CR":              "Mark,Length,N_Ed\rC1,3.6,1200.5\rC2,4.2,1200\r",
		"quoted":          "\"Mark\",\"Length\",\"N_Ed\"\n\"C1\",\"3.6\",\"1200.5\"\n\"C2\",\"4.2\",\"1200\"",
		"sep":             "sep=;\nMark;Length;N_Ed\nC1;3,6;1200,5\nC2;4,2;1200\n",
		"BOM":             "\ufeffMark,Length,N_Ed\nC1,3.6,1200.5\nC2,4.2,1200\n",
		"lists":           "Mark,Length,N_Ed,Restraints z-z\nC1,3.6,1200.5,1.2; 2.4\nC2,4.2,1200,1;2;3\n",
		"commas":          "Mark;Length;N_Ed;Restraints z-z\nC1;3,6;1200,5;1,2 2,4\nC2;4,2;1200,0;1,5 3,1\n",
	} {
		f := open(t, content)
		s := read(t, f)
		require.Len(t, s.Members, 2, name)
		for _, m := range s.Members {
			assert.Empty(t, m.Problems, name)
		}
		assert.Equal(t, 3600.0, s.Members[0].Column.Length, name)
		assert.Equal(t, 1200.5e3, s.Members[0].Column.Combinations[0].NEd, name)
		assert.Equal(t, 1200e3, s.Members[1].Column.Combinations[0].NEd, name)
		assert.True(t, strings.HasPrefix(s.Members[1].Column.Cell, "line "), name)
	}
}

// Whatever the dialect, the user's letters stay, and the results follow in it.
func TestWriterKeepsTheLetters(t *testing.T) {
	content := "Foundry Lane Depot;;;\r\nissue P2\r\n\r\n\"Mark\";Length;N_Ed;\"Re\nmarks\"\r\nC1;3,6;1 200,5;\"a \"\"b\"\";c\"\r\nC2;4,2\r\nTotal;;1200;;\r\nnote: all loads factored"
	out := annotate(t, open(t, content))
	assert.Contains(t, out, "issue P2\r\n\r\n")
	lines := few(t, out, ";")
	assert.Equal(t, []string{
		"Foundry Lane Depot",
		"issue P2",
		"",
		`"Mark";Length;N_Ed;"Re`,
		`marks";...`,
		`C1;3,6;1 200,5;"a ""b"";c";...`,
	}, lines[:6])
	assert.Contains(t, lines[6], "C2;4,2;;;;;")
	assert.Contains(t, lines[6], "not read")
	assert.Equal(t, "Total;;1200", lines[7])
	assert.Equal(t, "note: all loads factored", lines[8])
	assert.Contains(t, out, ";0,8754;")
	assert.Contains(t, out, "Result: N_b,y,Rd [kN]")
	assert.False(t, strings.HasSuffix(out, "\n"))
}

// A second run replaces what the first one wrote.
func TestWriterReplacesItsOwn(t *testing.T) {
	for _, content := range []string{
		"Title,,,\nMark,Length,N_Ed,Remarks\nC1,3.6,1200,\"x,y\"\nC2,bad,1200,\nTotal,,2400,\n",
		"Mark;Combination;Length;N_Ed\nC1;ULS1;3,6;1200\nC2;ULS1;3,6;1200\nC1;ULS2;;800\n",
		"\"Mark\",\"Length\",\"N_Ed\"\r\n\"C1\",\"3.6\",\"1200\"\r\n",
	} {
		once := annotate(t, open(t, content))
		twice := annotate(t, open(t, once))
		assert.Equal(t, once, twice)
		assert.NotEqual(t, content, once)
	}
}

func TestContinuedRows(t *testing.T) {
	out := annotate(t, open(t, "Mark,Combination,Length,N_Ed\nC1,ULS1,3.6,1200\nC2,ULS1,3.6,1200\nC1,ULS2,,800\n"))
	lines := strings.Split(out, "\n")
	assert.Contains(t, lines[1], ",184.4")
	assert.NotContains(t, lines[3], ",184.4")
	assert.Contains(t, lines[3], "203x203x46 UKC,S355,0.8754")
	assert.Contains(t, lines[3], "one member with line 2")
}

// Lines of other members are named as those of a file's own.
func TestMembersThatDisagreeNameTheirLines(t *testing.T) {
	out := annotate(t, open(t, "Schedule,,,,\nMark,Length,N_Ed,Group,Family\nC1,4,500,g,UKC\nC2,4,500,g,UKC\nC3,4,500,g,HE\n"))
	assert.Contains(t, out, `line 5, column 4: group ""g"" has more than one family: UKC in lines 3, 4; HEA, HEB, HEM in line 5`)
	assert.NotContains(t, out, " row ")
}

func TestEncodings(t *testing.T) {
	content := "Stütze;Länge;N_Ed\r\nC1–é;3,6;1200\r\n"
	latin, err := charmap.Windows1252.NewEncoder().String(content)
	require.NoError(t, err)
	le, err := unicode.UTF16(unicode.LittleEndian, unicode.UseBOM).NewEncoder().String(content)
	require.NoError(t, err)
	be, err := unicode.UTF16(unicode.BigEndian, unicode.UseBOM).NewEncoder().String(content)
	require.NoError(t, err)
	bare, err := unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM).NewEncoder().String(strings.Repeat("x;y\r\n", 20) + content)
	require.NoError(t, err)
	for name, bytes := range map[string]string{"UTF-8": content, "BOM": "\ufeff" + content, "Windows-1252": latin, "UTF-16LE": le, "UTF-16BE": be, "UTF-16 without BOM": bare} {
		f := open(t, bytes)
		s := read(t, f)
		require.Len(t, s.Members, 1, name)
		assert.Equal(t, "C1–é", s.Members[0].Column.Mark, name)
		out := annotate(t, f)
		// The user's first bytes stand as they were, and the whole reads back.
		n := strings.Index(bytes, "\r")
		assert.Equal(t, bytes[:n], out[:n], name)
		back := open(t, out)
		assert.Equal(t, f.form.name, back.form.name, name)
		assert.Equal(t, "C1–é", read(t, back).Members[0].Column.Mark, name)
	}
}

func TestFilesThatAreNone(t *testing.T) {
	dir := t.TempDir()
	_, err := Open(filepath.Join(dir, "nothing.csv"))
	assert.ErrorContains(t, err, "nothing.csv: no such file")
	_, err = Open(dir)
	assert.ErrorContains(t, err, "it is a folder")
	for content, want := range map[string]string{
		"":                      "the file is empty: give one that holds a schedule",
		"  \n \n":               "not a text file",
		"PK\x03\x04 and so on":  "it looks like a workbook",
		"a,b\x00\x01\x02,c,d,e": "not a text file",
	} {
		name := filepath.Join(dir, "x.csv")
		require.NoError(t, os.WriteFile(name, []byte(content), 0o600))
		_, err := Open(name)
		assert.ErrorContains(t, err, want)
		assert.ErrorContains(t, err, "x.csv")
	}
	f := open(t, "Mark,Length,N_Ed\nC1,3.6,\"1200\nC2,3.6,1200\n")
	_, err = schedule.Read(f, schedule.Options{National: ec3.NationalSet})
	assert.ErrorContains(t, err, "line 2: a quote is opened and not closed")
}

func TestTemporaryCopyGoes(t *testing.T) {
	f := open(t, "Mark,Length,N_Ed\nC1,3.6,1200\n")
	require.FileExists(t, f.temp)
	name := f.temp
	require.NoError(t, f.Close())
	assert.NoFileExists(t, name)
	// A regular UTF-8 file is read where it is.
	path := filepath.Join(t.TempDir(), "loads.csv")
	require.NoError(t, os.WriteFile(path, []byte("Mark,Length,N_Ed\nC1,3.6,1200\n"), 0o600))
	f, err := Open(path)
	require.NoError(t, err)
	assert.Empty(t, f.temp)
	require.NoError(t, f.Close())
}

// Settings stand in a file of two columns.
func TestSettingsFile(t *testing.T) {
	for _, content := range []string{"name,value\ngrade,S275\ngrowth,1.1\n", "grade;S275\ngrowth;1,1\n", "grade\tS275\ngrowth\t1.1\n"} {
		set := open(t, content)
		s, err := schedule.Read(open(t, "Mark,Length,N_Ed\nC1,3.6,1200\n"), schedule.Options{National: ec3.NationalSet, SettingsFile: set})
		require.NoError(t, err, content)
		assert.Equal(t, []string{"S275"}, s.Settings.Design.Grades, content)
		assert.Equal(t, 1.1, s.Settings.Design.Growth, content)
	}
}

func TestSplitKeepsEveryLetter(t *testing.T) {
	for _, raw := range []string{"", "a", "a,b", ",", "a,,b", `"a,b",c`, `"a""b",c`, `"a"x,c`, `a"b,c`, `"open`, `"",""`, `a,"b`} {
		var back []string
		for _, f := range split(raw, ',', nil) {
			back = append(back, f.raw)
		}
		assert.Equal(t, raw, strings.Join(back, ","))
	}
	texts := func(raw string) (list []string) {
		for _, f := range split(raw, ',', nil) {
			list = append(list, f.text)
		}
		return list
	}
	assert.Equal(t, []string{"a,b", "c"}, texts(`"a,b",c`))
	assert.Equal(t, []string{`a"b`, "c"}, texts(`"a""b",c`))
	assert.Equal(t, []string{`5" pipe`, "c"}, texts(`5" pipe,c`))
}

// Rows by position are the rows of the file.
func TestRowAt(t *testing.T) {
	f := open(t, "Mark,Length,N_Ed\nC1,3.6,\"12\n00\"\n\nC2,4,900")
	var seen []string
	var at []int64
	for r, err := range f.Rows("") {
		require.NoError(t, err)
		seen, at = append(seen, fmt.Sprint(r.Cells)), append(at, r.Pos)
	}
	require.Len(t, at, 3)
	for i := len(at) - 1; i >= 0; i-- {
		r, err := f.RowAt("", at[i])
		require.NoError(t, err)
		assert.Equal(t, seen[i], fmt.Sprint(r.Cells))
	}
}
