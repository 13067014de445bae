package catalogue

import (
	"fmt"
	"strings"
	"testing"
	"testing/iotest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
	"pgregory.net/rapid"
)

func readStock(text string) (*Catalogue, error) {
	return Default().Stock(strings.NewReader(text), "yard.csv")
}

func stockNames(t *testing.T, text string) []string {
	t.Helper()
	c, err := readStock(text)
	require.NoError(t, err, text)
	return namesOf(c.Sections())
}

// Lists of names as yards keep them. Common practice, no source.
func TestStockReadsListsOfNames(t *testing.T) {
	want := []string{"CHS 168.3x8.0", "203x203x60 UKC"}
	for what, text := range map[string]string{
		"comma":              "Section,Place\nUC 203x203x60,A1\nCHS 168.3x8,B2\n",
		"semicolon, decimal": "Bay;Size\nA1;UC 203x203x60\nB2;CHS 168,3x8\n",
		"tab":                "Serial size\tBay\n203x203x60 UKC\tA1\n168.3 x 8.0 CHS\tB2\n",
		"one column":         "Designation\nUKC 203x203x60\nCHS 168,3x8\n",
		"no header":          "203 UC 60\r\n\r\nCHS 168,3x8\r\n",
		"title above":        "Steel in the yard,,\n,,\nSection,Bay,\n203x203x60 UKC,A1,\n\n\"CHS 168,3x8\",B2,\n",
		"family beside":      "Type,Size\nUKC,203x203x60\nCHS,168.3x8\n",
		"byte order mark":    "\ufeffsection\n203x203x60\nCHS 168.3x8\n",
		"old line ends":      "section\r203x203x60\rCHS 168.3x8\r",
		"said twice":         "section\n203x203x60\nCHS 168.3x8\nUC 203x203x60\n",
		"dimensions agree":   "section,h_mm,b_mm,tw_mm\n203x203x60 UKC,209.6,205.8,9.4\nCHS 168.3x8,168.3,,\n",
		"dimensions unread":  "section,Depth\n203x203x60 UKC,deep\nCHS 168.3x8,\n",
	} {
		assert.ElementsMatch(t, want, stockNames(t, text), what)
	}
}

func TestStockReadsEncodings(t *testing.T) {
	text := "Größe;Section\n;203×203×60 UKC\n;CHS 168,3×8\n"
	latin, err := charmap.Windows1252.NewEncoder().String(text)
	require.NoError(t, err)
	wide, err := unicode.UTF16(unicode.LittleEndian, unicode.UseBOM).NewEncoder().String(text)
	require.NoError(t, err)
	for _, text := range []string{text, latin, wide} {
		assert.Len(t, stockNames(t, text), 2)
	}
}

func TestStockReadsOwnDimensions(t *testing.T) {
	c, err := readStock(`section,family,finish,h (mm),b (mm),tw (mm),tf (mm),r (mm),d (mm),t (mm),r1_mm,r2_mm,mass (kg/m)
old column A,UKC,,209.6,205.8,9.4,14.2,10.2,,,,,60.0
,PFC,,200,90,7,14,12,,,,,
,CHS,cold,,,,,,168.3,8,,,
box 1 CF,SHS,,150,150,,,,,"9,5",,,
,UA,,150,90,,,,,10,12,6,
`)
	require.NoError(t, err)
	all := c.Sections()
	require.Len(t, all, 5)
	published := map[string]string{
		"old column A": "203x203x60 UKC", "UKPFC 200x90x7x14": "200x90x30 UKPFC", "CHS 168.3x8 CF": "CHS 168.3x8.0 CF", "L 150x90x10": "L 150x90x10",
	}
	for _, s := range all {
		got, err := c.Find(s.Name(), FindOptions{ColdFormed: true})
		require.NoError(t, err, s.Name())
		assert.Same(t, s, got, s.Name())
		if name := published[s.Name()]; name != "" {
			same, err := Default().Find(name, FindOptions{})
			require.NoError(t, err)
			assert.Equal(t, same.Properties, s.Properties, name)
			assert.InEpsilon(t, same.Mass, s.Mass, 0.005, name)
			delete(published, s.Name())
		}
	}
	assert.Empty(t, published)
	box, err := c.Find("BOX 1 cf", FindOptions{})
	require.NoError(t, err)
	assert.Equal(t, ColdFormed, box.Finish)
	assert.Equal(t, 9.5, box.Tf)
}

func TestStockCountsPieces(t *testing.T) {
	c, err := readStock("section,Qty,length_mm,Steel grade\n203x203x60 UKC,3,8200,S275\n203x203x46 UKC,0,,\nUC 203x203x60,1,4000,\n152x152x23 UKC,,,\n")
	require.NoError(t, err)
	s, err := Default().Find("203x203x60 UKC", FindOptions{})
	require.NoError(t, err)
	assert.Equal(t, []Piece{{s, "S275", 8200, 3, 2}, {s, "", 4000, 1, 4}}, c.Pieces())
	assert.ElementsMatch(t, []string{"203x203x60 UKC", "152x152x23 UKC"}, namesOf(c.Sections()), "none of the 203x203x46 is at hand")
	assert.Empty(t, Default().Pieces())

	c, err = readStock("section;number;length (m)\n203x203x60 UKC;2;8,2\n")
	require.NoError(t, err)
	assert.Equal(t, []Piece{{s, "", 8200, 2, 2}}, c.Pieces())
}

func TestStockNamesWhatIsWrong(t *testing.T) {
	const own = "section,family,finish,h_mm,b_mm,tw_mm,tf_mm,r_mm,d_mm,t_mm,r1_mm,r2_mm,mass_kg_m\n"
	for text, want := range map[string]string{
		"":                       "a stock list has the columns",
		"place\nyard\n":          "no heading is known",
		"section\n":              "no section in the stock list",
		"section\n\n\nUKC 9x9\n": "yard.csv, line 4: section \"UKC 9x9\" is not in the catalogue",
		"section\n150x150x10\n":  "fits several",
		"section\nSHS 150x150x10 CF\nRHS 400x120x50\n":                   "line 3: section \"RHS 400x120x50\"",
		"section,size\na,b\n":                                            "both mean section",
		"family,h,b,tw,tf,r\nUKC,1,1,1,1,1\n":                            "heading \"h\" has no unit: call it h_mm",
		"section,number,length\n203x203x60 UKC,1,8\n":                    "heading \"length\" has no unit: call it length_m",
		"section,note\nCHS 168,3x8,new\n":                                "line 2 has 3 fields where the header has 2",
		"section,family\n203x203x60,UKB\n":                               "is of the family UKC, not UKB",
		"section,family\n203x203x60,XYZ\n":                               "\"XYZ\" is not known",
		"section,number,length_m\n203x203x60,x,1\n":                      "number is \"x\"",
		"section,number,length_m\n203x203x60,1,\n":                       "length_m is \"\"",
		"section,number,length_m\n203x203x60,1,8200\n":                   "length_m is \"8200\"",
		"section,length_m,length_mm\n203x203x60,8,8000\n":                "clear one",
		"section,h_mm\n203x203x60,220\n":                                 "has 209.6 in the catalogue",
		own + "a,UKC,,200,200,9,14,,,,,,\n":                              "r_mm is \"\"",
		own + "a,UKC,,200,200,9,x,10,,,,,\n":                             "tf_mm is \"x\"",
		own + "a,UKC,,NaN,200,9,14,10,,,,,\n":                            "h_mm is \"NaN\"",
		own + "a,UKC,,-200,200,9,14,10,,,,,\n":                           "h_mm is \"-200\"",
		own + "a,UKC,,40,200,9,14,10,,,,,\n":                             "must exceed twice tf_mm",
		own + "a,UKC,,200,20,9,14,10,,,,,\n":                             "b_mm must exceed tw_mm",
		own + "a,UKC,,200,200,9,14,10,,,,,90\n":                          "mass_kg_m is \"90\"",
		own + "a,,,200,200,9,14,10,,,,,\n":                               "needs its family",
		own + "a,HE,,200,200,9,14,10,,,,,\n":                             "stands for several",
		own + "a,UKC,cold,200,200,9,14,10,,,,,\n":                        "only hollow sections have one",
		own + "a,UKC,,10.5,2.5,1,4.5,0.5,,,,,\n":                         "far from those of a rolled section",
		own + "a,PFC,,40,90,7,14,12,,,,,\n":                              "must exceed twice tf_mm",
		own + "a,CHS,hot,,,,,,20,10,,,\n":                                "must exceed twice t_mm",
		own + "a,CHS,,,,,,,20,5,,,\n":                                    "needs its finish",
		own + "a CF,CHS,hot,,,,,,20,5,,,\n":                              "another finish",
		own + "a,SHS,hot,100,90,,,,,5,,,\n":                              "give the family RHS",
		own + "a,RHS,hot,90,100,,,,,5,,,\n":                              "exchange h_mm and b_mm",
		own + "a,RHS,cold,90,40,,,,,12,,,\n":                             "corners of radius 36 mm",
		own + "a,EA,,100,90,,,,,10,12,6,\n":                              "family L unequal",
		own + "a,UA,,90,100,,,,,10,12,6,\n":                              "longer leg",
		own + "a,UA,,90,20,,,,,10,12,6,\n":                               "b_mm must exceed",
		own + "a,CHS,hot,,,,,,90,5,,,\na,CHS,hot,,,,,,95,5,,,\n":         "line 3: \"a\" stands in line 2 with other dimensions",
		"family,h_mm\n,\nUKC,\n":                                         "line 3: names no section",
		"section\n" + strings.Repeat("nothing\n", 30):                    "10 more lines cannot be read",
		"section,finish\nSHS 150x150x10 CF,hot\n":                        "both hot finished and cold formed",
		strings.Repeat("one line of a letter that is no list\n", 1000):   "no heading is known",
		"section;number;length_m\n203x203x60;2;8,2\n203x203x60;2;8.2,\n": "line 3: length_m is \"8.2,\"",
	} {
		_, err := readStock(text)
		assert.ErrorContains(t, err, want, text)
		assert.ErrorContains(t, err, "yard.csv")
	}
	_, err := Default().Stock(iotest.ErrReader(fmt.Errorf("the disk is gone")), "yard.csv")
	assert.ErrorContains(t, err, "yard.csv: the disk is gone")
}

// A list written from the catalogue reads as the same sections.
func TestStockReadsBackTheCatalogue(t *testing.T) {
	all := Default().Sections()
	rapid.Check(t, func(t *rapid.T) {
		var want []*Section
		comma := rapid.SampledFrom([]string{",", ";", "\t"}).Draw(t, "separator")
		text := "section" + comma + "h_mm\n"
		for range rapid.IntRange(1, 20).Draw(t, "lines") {
			s := all[rapid.IntRange(0, len(all)-1).Draw(t, "section")]
			depth := ""
			if rapid.Bool().Draw(t, "depth") {
				depth = fmt.Sprint(s.H)
			}
			text += s.FullName() + comma + depth + "\n"
			want = append(want, s)
		}
		c, err := Default().Stock(strings.NewReader(text), "yard.csv")
		if err != nil {
			t.Fatal(err)
		}
		for _, s := range want {
			if got, err := c.Find(s.FullName(), FindOptions{}); err != nil || got != s {
				t.Fatalf("%s: %v", s.FullName(), err)
			}
		}
	})
}

// Own dimensions give the properties that the drawing has, or are refused.
func TestOwnDimensionsAgreeWithTheDrawing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		draw1 := func(name string, most float64) float64 { return rapid.Float64Range(0.5, most).Draw(t, name) }
		family := rapid.SampledFrom([]string{"UKC", "PFC", "CHS", "SHS", "RHS", "EA", "UA"}).Draw(t, "family")
		h := draw1("h", 600)
		b := h
		if family == "UKC" || family == "PFC" || family == "RHS" || family == "UA" {
			b = draw1("b", 600)
		}
		text := "family;finish;h_mm;b_mm;tw_mm;tf_mm;r_mm;d_mm;t_mm;r1_mm;r2_mm\n" +
			fmt.Sprintf("%s;;%g;%g;%g;%g;%g;;;;\n", family, h, b, draw1("tw", 60), draw1("tf", 60), draw1("r", 30))
		switch family {
		case "CHS", "SHS", "RHS":
			finish := rapid.SampledFrom([]string{"hot", "cold"}).Draw(t, "finish")
			text = "family;finish;h_mm;b_mm;d_mm;t_mm\n" + fmt.Sprintf("%s;%s;%g;%g;%[3]g;%[5]g\n", family, finish, h, b, draw1("t", 60))
		case "EA", "UA":
			text = "family;h_mm;b_mm;t_mm;r1_mm;r2_mm\n" + fmt.Sprintf("%s;%g;%g;%g;%g;%g\n", family, h, b, draw1("t", 60), draw1("r1", 30), draw1("r2", 15))
		}
		c, err := Default().Stock(strings.NewReader(text), "yard.csv")
		if err != nil {
			return
		}
		s := c.Sections()[0]
		m := draw(s).moments().central()
		for what, pair := range map[string][2]float64{"A": {m.a, s.A}, "Iy": {m.zz, s.Iy}, "Iz": {m.yy, s.Iz}} {
			if got := pair[1] / pair[0]; !(got > 1-1e-4 && got < 1+1e-4) {
				t.Fatalf("%s: %s is %g of the drawing's", text, what, got)
			}
		}
		for what, v := range map[string]float64{"It": s.It, "perimeter": s.Perimeter, "iv": s.RadV, "mass": s.Mass} {
			if !(v > 0) {
				t.Fatalf("%s: %s is %g", text, what, v)
			}
		}
	})
}

func FuzzStock(f *testing.F) {
	for _, s := range []string{
		"section\n203x203x60 UKC\n", "203 UC 60", "Size;number;length_m\nCHS 168,3x8;2;6,5\n",
		"family,h_mm,b_mm,tw_mm,tf_mm,r_mm\nUKC,200,200,9,14,10\n", "family,finish,d_mm,t_mm\nCHS,cold,100,5\n", "\xff\xfes\x00", "section\n\"", "length\n\n\t;,",
	} {
		f.Add([]byte(s))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		c, err := Default().Stock(strings.NewReader(string(data)), "yard.csv")
		if (c == nil) == (err == nil) {
			t.Fatal("neither a list nor an error, or both")
		}
		if err != nil {
			return
		}
		for _, s := range c.Sections() {
			if !(s.A > 0 && s.RadV > 0 && s.RadZ > 0 && s.Mass > 0) {
				t.Fatalf("%s: %+v", s.Name(), s.Properties)
			}
			if got, err := c.Find(s.FullName(), FindOptions{}); err != nil || got != s {
				t.Fatalf("%q is not read back: %v", s.FullName(), err)
			}
		}
	})
}

func BenchmarkStock(b *testing.B) {
	var text strings.Builder
	text.WriteString("section,number,length_m\n")
	for _, s := range Default().Sections() {
		fmt.Fprintf(&text, "%s,3,8.5\n", s.Name())
	}
	for b.Loop() {
		if _, err := readStock(text.String()); err != nil {
			b.Fatal(err)
		}
	}
}
