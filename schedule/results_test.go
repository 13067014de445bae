package schedule

import (
	"bytes"
	"encoding/json"
	"math"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// sized is a member with a result in which every value is set.
func sized() (*Member, *design.Result) {
	m := &Member{Rows: []int{7, 9}, Column: design.Column{
		Mark: "C1", Stack: "A1", From: "GF", To: "L1", Quantity: 2, Length: 5000, Cell: "Columns!A7",
		Combinations: []design.Combination{{Name: "ULS1", NEd: 900e3, Steps: []design.Step{{Height: 2500, NEd: 700e3}}}, {Name: "ULS2", NEd: 1000e3}},
		Notes:        []string{"the row is hidden"},
	}}
	r := &design.Result{
		Status: design.Passes, Notes: []string{"checked"}, Section: "203x203x60 UKC", Grade: "S355", Utilisation: 0.8765432,
		Governing: design.Check{Kind: design.FlexuralZ, Clause: "6.3.1.1(1)", Combination: 1, From: 2500, To: 5000, NEd: 1000e3, Ed: 1000e3, Rd: 1140.845e3, Utilisation: 0.8765432},
		Y:         design.Buckling{Lcr: 5000, LambdaBar: 0.62112, Curve: "b", Chi: 0.82632, NbRd: 2240.3e3},
		Z:         design.Buckling{Lcr: 2500, LambdaBar: 0.50343, Curve: "c", Chi: 0.84107, NbRd: 1140.845e3},
		T:         design.Buckling{Lcr: 2500, NbRd: 2352.5e3}, HasT: true, TKind: design.Torsional,
		MbRd: 231.5e6, Class: 1, Fy: 355, MassPerM: 60, Mass: 300,
		NextLighter: "203x203x52 UKC", NextLighterGrade: "S355", NextLighterUtilisation: 1.0004, NextLighterCheck: design.Check{Kind: design.FlexuralY},
		Reserve: 1.14, ReserveN: 140e3, ReserveCheck: design.FlexuralZ,
		Fire: design.FireResult{Asked: true, CriticalTemperature: 571.23, SectionFactor: 205, TimeToCritical: 17.5},
	}
	return m, r
}

// jsonKeys are the keys of a line, in the order that other programs rely on.
const jsonKeys = `mark, stack, from, to, quantity, status, note, section, grade, utilisation, axis, check, clause, combination,
segment, N_Ed_kN, N_b_y_Rd_kN, N_b_z_Rd_kN, N_b_T_Rd_kN, M_b_Rd_kNm, L_cr_y_m, L_cr_z_m, L_T_m, lambda_bar_y, lambda_bar_z,
chi_y, chi_z, curve_y, curve_z, class, fy_MPa, mass_kg_m, mass_kg, next_lighter, next_lighter_utilisation,
next_lighter_check, cell, critical_temperature_C`

func jsonOf(t *testing.T, m *Member, r *design.Result) string {
	var out bytes.Buffer
	j := NewJSONLines(&out)
	require.NoError(t, j.Write(m, r))
	require.NoError(t, j.Flush())
	return out.String()
}

func TestJSONLine(t *testing.T) {
	m, r := sized()
	line := jsonOf(t, m, r)
	var keys []string
	for _, k := range regexp.MustCompile(`"(\w+)":`).FindAllStringSubmatch(line, -1) {
		keys = append(keys, k[1])
	}
	assert.Equal(t, strings.FieldsFunc(jsonKeys, func(r rune) bool { return r == ',' || r == ' ' || r == '\n' }), keys)
	assert.Equal(t, `{"mark":"C1","stack":"A1","from":"GF","to":"L1","quantity":2,"status":"passes","note":"checked; the row is hidden",`+
		`"section":"203x203x60 UKC","grade":"S355","utilisation":0.876543,"axis":"z-z","check":"flexural buckling z-z","clause":"6.3.1.1(1)",`+
		`"combination":"ULS2","segment":"2.5-5.0","N_Ed_kN":1000,"N_b_y_Rd_kN":2240.3,"N_b_z_Rd_kN":1140.85,"N_b_T_Rd_kN":2352.5,"M_b_Rd_kNm":231.5,`+
		`"L_cr_y_m":5,"L_cr_z_m":2.5,"L_T_m":2.5,"lambda_bar_y":0.62112,"lambda_bar_z":0.50343,"chi_y":0.82632,"chi_z":0.84107,"curve_y":"b","curve_z":"c",`+
		`"class":1,"fy_MPa":355,"mass_kg_m":60,"mass_kg":300,"next_lighter":"203x203x52 UKC","next_lighter_utilisation":1.0004,"next_lighter_check":"flexural buckling y-y",`+
		`"cell":"Columns!A7","critical_temperature_C":571.23}`+"\n", line)
}

func TestJSONOfWhatWasNotRead(t *testing.T) {
	m := &Member{Rows: []int{7}, Column: design.Column{Mark: "C1", Quantity: 1, Cell: "Columns!A7"}}
	m.Problems = []*Problem{{File: "loads.xlsx", Cell: "Columns!F7", What: `N_Ed is "tbc"`, Do: "give a number in kN, or clear the row"}}
	r := NotReadResult(m)
	var line map[string]any
	require.NoError(t, json.Unmarshal([]byte(jsonOf(t, m, &r)), &line))
	assert.Len(t, line, 38)
	for k, v := range line {
		switch k {
		case "mark", "quantity", "status", "note", "cell":
			assert.NotNil(t, v, k)
		default:
			assert.Nil(t, v, k)
		}
	}
	assert.Equal(t, "not read", line["status"])
	assert.Equal(t, `Columns!F7: N_Ed is "tbc": give a number in kN, or clear the row`, line["note"])
}

// No value of a result may make a line that is no JSON.
func TestJSONOfOddValues(t *testing.T) {
	m, r := sized()
	m.Column.Mark = "a\"b\\\n<é\x01"
	r.Utilisation, r.Y.NbRd, r.Z.Chi = math.Inf(1), math.NaN(), math.Inf(-1)
	r.Governing = design.Check{Kind: design.Refused, Combination: 99, Reason: "class 4"}
	var line map[string]any
	require.NoError(t, json.Unmarshal([]byte(jsonOf(t, m, r)), &line))
	assert.Equal(t, m.Column.Mark, line["mark"])
	assert.Nil(t, line["utilisation"])
	assert.Nil(t, line["combination"])
}

// N_Ed is that of the governing check, tension negative; a check that rests on
// no force says 0, and a refusal nothing.
func TestJSONOfTheGoverningForce(t *testing.T) {
	m, r := sized()
	for _, c := range []struct {
		check design.Check
		want  any
	}{
		{design.Check{Kind: design.Interaction661, NEd: 990.5e3}, 990.5},
		{design.Check{Kind: design.Tension, NEd: -70e3, Ed: 70e3}, -70.0},
		{design.Check{Kind: design.BendingY}, 0.0},
		{design.Check{Kind: design.Refused}, nil},
		{design.Check{}, nil},
	} {
		r.Governing = c.check
		var line map[string]any
		require.NoError(t, json.Unmarshal([]byte(jsonOf(t, m, r)), &line))
		assert.Equal(t, c.want, line["N_Ed_kN"], c.check.Kind)
	}
}

// What is said of fire reaches the row: why there is no critical temperature,
// and which lengths were used (4.2.3.2 of EN 1993-1-2 asks for those in fire).
func TestNoteOfFire(t *testing.T) {
	m, r := sized()
	r.Fire = design.FireResult{Asked: true, Reason: "a moment acts", Notes: []string{"L_fi,y is not given"}}
	assert.Equal(t, "checked; no critical temperature: a moment acts; L_fi,y is not given; the row is hidden", Note(m, r))
	r.Fire.Reason = ""
	assert.Equal(t, "checked; L_fi,y is not given; the row is hidden", Note(m, r))
}

func TestResultColumns(t *testing.T) {
	m, r := sized()
	cols := ResultColumns(ResultOptions{Reserve: true, Fire: true})
	values := Cells(nil, cols, m, r)
	got := map[string]string{}
	var names []string
	for i := range cols {
		got[cols[i].Heading()] = values[i].Format(&cols[i], '.')
		names = append(names, cols[i].Name)
		assert.True(t, IsResultHeading(cols[i].Heading()))
		name, _ := resultName(cols[i].Heading())
		assert.Equal(t, cols[i].Name, name)
		assert.Empty(t, readHeading(cols[i].Name).trouble)
	}
	// The order that users are told.
	assert.Equal(t, []string{"section", "grade", "utilisation", "governing axis", "governing check", "clause", "combination", "segment",
		"N_b,y,Rd", "N_b,z,Rd", "N_b,T,Rd", "L_cr,y", "L_cr,z", "lambda_bar,y", "lambda_bar,z", "chi_y", "chi_z", "curve y", "curve z", "class", "fy",
		"mass per metre", "mass", "next lighter", "fails in", "its utilisation", "reserve factor on N_Ed", "reserve on N_Ed", "then fails in",
		"critical temperature", "A_m/V", "time to critical, unprotected", "status", "note"}, names)
	assert.Equal(t, "203x203x60 UKC", got["Result: section"])
	assert.Equal(t, "0.87654", got["Result: utilisation"])
	assert.Equal(t, "1140.8", got["Result: N_b,z,Rd [kN]"])
	assert.Equal(t, "2.500", got["Result: L_cr,z [m]"])
	assert.Equal(t, "1", got["Result: class"])
	assert.Equal(t, "355", got["Result: fy [N/mm2]"])
	assert.Equal(t, "passes", got["Result: status"])
	assert.Equal(t, "checked; the row is hidden", got["Result: note"])
	assert.Len(t, ResultColumns(ResultOptions{}), 28)

	// Sums stay right: a further row repeats no mass.
	further := ContinuedCells(nil, cols, m, r)
	for i := range cols {
		switch cols[i].Name {
		case "section", "grade", "utilisation", "status":
			assert.Equal(t, values[i], further[i])
		case "note":
			assert.Equal(t, "one member with row 7", further[i].Text)
		default:
			assert.Equal(t, Value{}, further[i], cols[i].Name)
		}
	}
}

func TestNumbersAsWritten(t *testing.T) {
	for _, c := range []struct {
		x        float64
		decimals int
		decimal  byte
		want     string
	}{
		{0.5, 3, '.', "0.500"}, {0.123456, 3, '.', "0.12346"}, {0.0012345678, 3, '.', "0.0012346"}, {12345.678, 1, '.', "12345.7"}, {184.4, 1, ',', "184,4"},
		{1, 0, '.', "1"}, {355, 0, '.', "355"}, {1234567.8, 1, '.', "1234570.0"}, {math.Pi / 1000, 1, ',', "0,0031416"},
	} {
		col := ResultColumn{Decimals: c.decimals}
		v := Value{Kind: Number, Number: c.x}
		assert.Equal(t, c.want, v.Format(&col, c.decimal))
	}
}

func TestWords(t *testing.T) {
	axes := map[string]bool{"y-y": true, "z-z": true, "torsional": true, "torsional-flexural": true, "lateral-torsional": true, "cross-section": true, "combined": true}
	for k := design.Tension; k < design.Refused; k++ {
		assert.NotEmpty(t, CheckName(k), k)
		assert.True(t, axes[AxisName(k)], k)
	}
	assert.Equal(t, "outside the rules", CheckName(design.Refused))
	assert.Empty(t, AxisName(design.Refused))
	assert.Empty(t, CheckName(design.KindNone))
	assert.Equal(t, "2.5-5.0", SegmentName(2500, 5000))
	assert.Equal(t, "0.0-3.675", SegmentName(0, 3675))
	assert.Equal(t, "0.0-3.333", SegmentName(0, 10000./3))
}
