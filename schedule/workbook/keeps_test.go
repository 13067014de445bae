package workbook

import (
	"archive/zip"
	"bytes"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// Parts to which something is added. Every other part must come back as it
// was, to the compressed byte.
var addedTo = map[string]bool{
	"[Content_Types].xml":        true,
	"xl/workbook.xml":            true,
	"xl/_rels/workbook.xml.rels": true,
	"xl/styles.xml":              true,
	"xl/worksheets/sheet1.xml":   true,
}

// requireKept compares every part before and after.
func requireKept(t *testing.T, before, after []byte, added map[string]bool) {
	t.Helper()
	old, got := unpack(t, before), unpack(t, after)
	rawOld, rawGot := compressed(t, before), compressed(t, after)
	for _, name := range sortedKeys(old) {
		require.Contains(t, got, name)
		if !added[name] {
			require.Equal(t, old[name], got[name], name)
			require.Equal(t, rawOld[name], rawGot[name], "%s is copied as it is", name)
			continue
		}
		requireTokensKept(t, name, old[name], got[name])
	}
}

// compressed returns the parts as they stand in the archive.
func compressed(t *testing.T, data []byte) parts {
	t.Helper()
	z, err := zip.NewReader(bytes.NewReader(data), int64(len(data)))
	require.NoError(t, err)
	p := parts{}
	for _, f := range z.File {
		r, err := f.OpenRaw()
		require.NoError(t, err)
		b, err := io.ReadAll(r)
		require.NoError(t, err)
		p[f.Name] = string(b)
	}
	return p
}

// requireTokensKept requires that the tokens of a part are still there, in
// their order, with nothing but what the block asks for changed within a tag.
func requireTokensKept(t *testing.T, name, before, after string) {
	t.Helper()
	old, got := tokensOf(t, before), tokensOf(t, after)
	at := 0
	for i, token := range old {
		found := false
		for ; at < len(got) && !found; at++ {
			found = got[at] == token
		}
		require.True(t, found, "%s: token %d is lost: %s", name, i, token)
	}
}

// tokensOf splits a part into tokens, without the attributes that may change
// where something is added.
func tokensOf(t *testing.T, doc string) []string {
	t.Helper()
	scan := markup.NewScanner(strings.NewReader(doc))
	var out []string
	for {
		token, err := scan.Next()
		if err == io.EOF {
			return out
		}
		require.NoError(t, err)
		raw := string(token.Raw)
		if token.Kind == markup.Start || token.Kind == markup.Empty {
			switch string(token.Local()) {
			case "fonts", "fills", "borders", "cellXfs", "dxfs", "numFmts", "mergeCells":
				raw = markup.SetAttrs(token.Raw, "count", "")
			case "dimension", "autoFilter":
				raw = markup.SetAttrs(token.Raw, "ref", "")
			case "calcPr":
				raw = markup.SetAttrs(token.Raw, "fullCalcOnLoad", "")
			case "row":
				raw = markup.SetAttrs(token.Raw, "spans", "", "ht", "")
			}
			raw = strings.Replace(raw, "/>", ">", 1)
		}
		out = append(out, raw)
	}
}

func TestNothingOfTheUsersIsLost(t *testing.T) {
	in := rich(t)
	out := annotate(t, in, richBlock(), ownSheets()...)

	// What the block asks to be widened is checked here, and set back so that
	// all else can be compared.
	got := unpack(t, out)
	sheet := got["xl/worksheets/sheet1.xml"]
	assert.Contains(t, sheet, `<autoFilter ref="A5:K14">`)
	assert.Contains(t, sheet, `max="16384" min="12"`, "the columns behind the block stay hidden")
	assert.Contains(t, sheet, `spans="1:11"`)
	names := got["xl/workbook.xml"]
	assert.Contains(t, names, `>'Columns'!$A$5:$K$14<`)
	assert.Contains(t, names, `>Columns!$A$1:$E$14<`, "the schedule prints as it did")
	assert.Contains(t, names, `<calcPr iterate="1" iterateCount="7" calcId="122211" fullCalcOnLoad="1">`)

	before := unpack(t, in)
	set := func(name, from, to string) {
		require.Contains(t, before[name], from, name)
		before[name] = strings.Replace(before[name], from, to, 1)
	}
	set("xl/workbook.xml", `&#39;Columns&#39;!$A$5:$E$14`, `'Columns'!$A$5:$K$14`)
	set("xl/worksheets/sheet1.xml", `max="16384" min="8"`, `max="16384" min="12"`)
	requireKept(t, before.bytes(t), out, addedTo)
}

func TestOpensInTheLibraryWithEveryFeature(t *testing.T) {
	out := annotate(t, rich(t), richBlock(), ownSheets()...)
	text := dump(t, out)
	for _, want := range []string{
		"Columns!A1 = Riverside depot: column schedule",
		"Columns!F4 = Result: status | bold, ink FFFFFF, fill 2F4858, left",
		"Columns!F6 = ✗ no section",
		"Columns!K14 = row 14: a < b & \"c\"",
		"Columns!B15 =  =SUM(B6:B14)",
		"Summary!A1 = Summary | bold",
		"Sizes used!A1 = Section | bold, ink FFFFFF, fill 2F4858",
	} {
		assert.True(t, strings.Contains(text, want), want)
	}
}

func TestTextsOfOwnSheetsComeThrough(t *testing.T) {
	b, err := OpenBytes("out.xlsx", annotate(t, rich(t), richBlock(), ownSheets()...))
	require.NoError(t, err)
	got := all(t, b, "Sizes used")
	assert.Equal(t, " padded \n ", got[3][0].Text)
	assert.Equal(t, schedule.Bool, got[3][1].Kind)
	assert.Equal(t, 4.0, got[2][1].Number)
	assert.NotContains(t, b.Sheets(), "Summary", "sheets of ours are not schedules")
}

func TestSameInputSameBytes(t *testing.T) {
	in := rich(t)
	first, second := annotate(t, in, richBlock(), ownSheets()...), annotate(t, in, richBlock(), ownSheets()...)
	requireSame(t, first, second)
}

func TestAnnotatingAgainChangesNothing(t *testing.T) {
	once := annotate(t, rich(t), richBlock(), ownSheets()...)
	again := richBlock()
	again.Header.Old = []int{5, 6, 7, 8, 9, 10}
	twice := annotate(t, once, again, ownSheets()...)
	requireSame(t, once, twice)
}

// requireSame requires that two workbooks are the same to the byte, and says
// which parts are not.
func requireSame(t *testing.T, first, second []byte) {
	t.Helper()
	a, b := unpack(t, first), unpack(t, second)
	assert.Equal(t, sortedKeys(a), sortedKeys(b))
	for _, name := range sortedKeys(a) {
		if a[name] != b[name] {
			i := 0
			for i < len(a[name]) && i < len(b[name]) && a[name][i] == b[name][i] {
				i++
			}
			from := max(0, i-200)
			assert.Fail(t, "parts differ", "%s:\n%.400s\n%.400s", name, a[name][from:], b[name][from:])
		}
	}
	assert.True(t, bytes.Equal(first, second), "to the byte")
}

func TestEveryPartHasATypeAndEveryRelationATarget(t *testing.T) {
	out := annotate(t, rich(t), richBlock(), ownSheets()...)
	pkg, err := opc.Open(bytes.NewReader(out), int64(len(out)))
	require.NoError(t, err)
	m, err := openManifest(pkg)
	require.NoError(t, err)
	for _, name := range append(pkg.Names(), "") {
		if name != "" && name != opc.ContentTypes {
			assert.NotEmpty(t, m.typeOf(name), name)
		}
		rels, err := pkg.Rels(name)
		require.NoError(t, err)
		ids := map[string]bool{}
		for _, r := range rels {
			assert.False(t, ids[r.ID], "%s of %s stands twice", r.ID, name)
			ids[r.ID] = true
			assert.True(t, r.Outside || pkg.Has(r.Target), "%s: %s", name, r.Target)
		}
	}
	for part := range m.overrides {
		assert.True(t, pkg.Has(part), part)
	}
}
