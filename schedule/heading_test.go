package schedule

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
)

// say writes a meaning as one line: fields, rank, combination, height, unit.
func say(m *meaning) string {
	var parts []string
	for _, k := range m.keys {
		parts = append(parts, k.String())
	}
	s := strings.Join(parts, " + ")
	if len(m.keys) > 0 && !m.exact {
		s += " ?"
	}
	if m.combination != "" {
		s += " {" + m.combination + "}"
	}
	if m.above != nil {
		s += " above " + metres(m.above.mm)
	}
	if m.unit != nil {
		s += " [" + m.unit.name + "]"
	}
	if m.vetoed {
		s += " vetoed"
	}
	if m.trouble != "" {
		s += " ! " + m.trouble
	}
	return s
}

func TestReadHeading(t *testing.T) {
	for heading, want := range map[string]string{
		"Mark": "Mark", "Column": "Mark ?", "Column mark": "Mark", "Ref": "Mark ?", "Member": "Mark ?", "ID": "Mark ?", "Column No.": "Mark",
		"Grid": "Stack", "Grid ref": "Stack", "Column line": "Stack", "Location": "Stack ?", "Stack": "Stack",
		"Level from": "Level from", "Level to": "Level to", "Base level": "Level from", "Top Level": "Level to", "Lower floor": "Level from",
		"Upper\nfloor": "Level to", "From": "Level from", "To": "Level to", "Storey": "Level ?", "Lift": "Level ?", "From level": "Level from",
		"Level top": "Level to", "Level Lower": "Level from", "Bottom of level": "Level from ?",
		"Qty": "Quantity", "No.": "Quantity ?", "No off": "Quantity", "Number": "Quantity ?", "Anzahl": "Quantity",
		"Combination": "Combination", "Combo": "Combination", "Load combination": "Combination", "ULS case": "Combination",
		"Length": "Length", "LENGTH (m)": "Length [m]", "Length, mm": "Length [mm]", "Length in mm": "Length [mm]", "Length mm": "Length [mm]",
		"Base/Top level": "Level ?", "Lower / upper floor": "Level ?",
		"Ly (m)": "L_cr,y ? [m]", "L z-z": "L_cr,z ?", "Unbraced length z-z": "L_cr,z ?", "Col. No.": "Mark", "Axial load G": " vetoed", "Axial Gk": " vetoed", "N_Ed G+Q": " vetoed", "N_Ed (1.35G+1.5Q)": "N_Ed {1.35G+1.5Q}",
		"N_Ed Wind X": "N_Ed {Wind X}", "Axial load (kN) Wind Y": "N_Ed {Wind Y} [kN]", "N_Ed Comb B": "N_Ed {Comb B}", "Axial Case A": "N_Ed {Case A}", "M_y,Ed top Comb B": "M_y,Ed top {Comb B}",
		"K": "k_y + k_z ?", "K factor z-z": "k_z", "UC section": "Section ?", "M (kNm)": "",
		"Height": "Length", "Storey height": "Length", "L": "Length", "L [m]": "Length [m]", "Länge [m]": "Length [m]", "Column length L (m)": "Length [m]",
		"Length (ft)": "Length ! the unit ft is not read for Length", "Length (kN)": "Length ! kN is not a unit of Length",
		"Length (clear)": "Length", "Length (m) *": "Length [m]", "Total length": "", "Beam length": "", "Length of beam": "", "Max length": "",
		"N_Ed": "N_Ed", "NEd": "N_Ed", "N,Ed": "N_Ed", "N Ed [kN]": "N_Ed [kN]", "Nₑd": "N_Ed", "N_Ed / kN": "N_Ed [kN]", "Axial load (kN)": "N_Ed [kN]",
		"AXIAL LOAD": "N_Ed", "Factored axial": "N_Ed", "ULS axial": "N_Ed", "Axial": "N_Ed", "N_{Ed} (MN)": "N_Ed [MN]", "Design axial force NEd [kN]": "N_Ed [kN]",
		"N_Ed ULS1": "N_Ed {ULS1}", "N_Ed, ULS 2": "N_Ed {ULS 2}", "NEd (ULS1) [kN]": "N_Ed {ULS1} [kN]", "N_Ed ULS": "N_Ed", "N_Ed 1": "N_Ed {1}",
		"Axial load ULS1 (kN)": "N_Ed {ULS1} [kN]", "ULS1 N_Ed": "N_Ed {ULS1}", "N_Ed 1.35G+1.5Q": "N_Ed {1.35G+1.5Q}", "N_Ed Combination 3": "N_Ed {Combination 3}",
		"Max N_Ed": "N_Ed {Max}", "Axial load min": "N_Ed {min}", "N_Ed persistent": "N_Ed {persistent}", "NEd,1": "N_Ed {1}", "N_Ed LC1 kN": "N_Ed {LC1} [kN]",
		"N_Ed above 2.5 m": "N_Ed above 2.5", "N_Ed above 2,5 m (kN)": "N_Ed above 2.5 [kN]", "N_Ed ULS1 above 2500 mm [kN]": "N_Ed {ULS1} above 2.5 [kN]",
		"N_Ed above 2.5 m ULS2": "N_Ed {ULS2} above 2.5", "Length above 2.5 m": "",
		"Axial capacity": "", "N_b,Rd": "", "Axial (SLS)": " vetoed", "Dead axial": " vetoed", "Unfactored axial load (kN)": " vetoed", "Axial load Gk": " vetoed",
		"N_Ed (t)": "N_Ed ! the unit t is not read for N_Ed", "Axial load (kips)": "N_Ed ! the unit kips is not read for N_Ed",
		"M_y,Ed bottom": "M_y,Ed bottom", "M_y,Ed top (kNm)": "M_y,Ed top [kNm]", "Myy bottom": "M_y,Ed bottom", "Moment y-y top": "M_y,Ed top", "Moment y-y top [kN.m]": "M_y,Ed top [kNm]",
		"M_z,Ed top ULS1": "M_z,Ed top {ULS1}", "Mz bottom": "M_z,Ed bottom", "My,top": "M_y,Ed top", "MyTop": "M_y,Ed top", "Top moment major axis": "M_y,Ed top", "My,Ed,bot": "M_y,Ed bottom",
		"Moment z-z ULS2 bottom": "M_z,Ed bottom {ULS2}", "M_y,Ed (kNm)": "M_y,Ed bottom + M_y,Ed top ? [kNm]", "M_y,Ed": "M_y,Ed bottom + M_y,Ed top ?",
		"Moment top": "M_,Ed top ! it names no axis", "Moment x-x top": "M_x,Ed top ! it speaks of x-x", "M_Rd": "", "Mx top": "M_x,Ed top ! it speaks of x-x",
		"Reaction flange A": "Reaction flange A", "Flange B reaction (kN)": "Reaction flange B [kN]", "Web A": "Reaction web A ?", "Beam reaction web B ULS1": "Reaction web B {ULS1}",
		"L_cr,y": "L_cr,y", "Lcr,z (m)": "L_cr,z [m]", "Effective length y-y": "L_cr,y", "Buckling length z-z [mm]": "L_cr,z [mm]", "Le y-y": "L_cr,y", "Lcr z-z": "L_cr,z",
		"Effective length": "L_cr,y + L_cr,z ?", "Effective length x-x": "L_cr,x ! it speaks of x-x", "Buckling length y-y Lcr,y": "L_cr,y", "Effective length (both axes)": "L_cr,y + L_cr,z",
		"L_T": "L_T", "L_T (m)": "L_T [m]", "Torsional buckling length": "L_T", "Buckling length torsion": "L_T",
		"k_y": "k_y", "k z-z": "k_z", "Effective length factor y-y": "k_y", "Effective length factor, z-z": "k_z", "kz": "k_z", "Effective length factor": "k_y + k_z ?",
		"Ends y-y": "Ends y-y", "End conditions z-z": "Ends z-z", "End fixity y-y": "Ends y-y", "Ends": "Ends y-y + Ends z-z ?", "End y-y bottom": "Ends y-y bottom",
		"Restraints y-y": "Restraints y-y", "Restraints z-z (mm)": "Restraints z-z [mm]", "Restraint heights z-z": "Restraints z-z", "Restraints": "", "Torsion restraints": "Restraints torsion",
		"Restraints torsion": "Restraints torsion", "Torsional restraints (m)": "Restraints torsion [m]", "z-z held at flange": "z-z held at flange", "Minor axis restraints": "Restraints z-z",
		"Section": "Section", "Size": "Section", "Section size": "Section", "Serial size": "Section", "Steel section": "Section", "Top section": "",
		"Grade": "Grade", "Steel grade": "Grade", "Steel": "Grade", "Family": "Family", "Section type": "Family",
		"Max depth": "Greatest depth", "Max. depth (mm)": "Greatest depth [mm]", "Greatest width": "Greatest width", "Min width": "Least width", "Least depth": "Least depth", "Max h": "Greatest depth", "Depth": "", "Min thickness": "Least thickness",
		"eta y-y bottom": "eta y-y bottom", "η z-z top": "eta z-z top", "Stiffness z-z top": "Stiffness z-z top", "Rotational stiffness y-y bottom (kNm/rad)": "Stiffness y-y bottom [kNm/rad]",
		"Distribution factor y-y top": "eta y-y top", "eta y-y": "eta y-y bottom + eta y-y top ?",
		"L_fi,y": "L_fi,y", "Lfi,z (m)": "L_fi,z [m]", "Fire buckling length y-y": "L_fi,y", "Buckling length in fire z-z": "L_fi,z", "Buckling length y-y (fire)": "L_fi,y", "eta_fi": "eta_fi",
		"Utilisation limit": "Utilisation limit", "Max utilisation": "Utilisation limit", "Utilisation": "", "Limit": "Utilisation limit ?",
		"Group": "Group", "Column group": "Group", "Splice": "Splice", "Splice above": "Splice",
		"Remarks": "", "Comments": "", "": "", "m": "", "Rev": "", "3.5": "", "Project": "", "Drawing no": "", "Utilisation limit (%)": "Utilisation limit [%]",
		"Restraints between the ends y-y": "Restraints y-y", "Restraint heights from bottom z-z (m)": "Restraints z-z [m]", "Restraints y-y by floor beams": "",
		"Restraints z-z, steelwork only": "Restraints z-z ?", "Effective length y-y braced": "L_cr,y ?", "Effective length check y-y": "",
		"N_Ed_kN": "N_Ed [kN]", "length_m": "Length [m]", "My_top_kNm": "M_y,Ed top [kNm]", "N_Ed_kN_ULS1": "N_Ed {ULS1} [kN]", "L_cr_y_m": "L_cr,y [m]", "restraints_zz_mm": "Restraints z-z [mm]",
		"N_Ed 6.10a": "N_Ed {6.10a}", "N_Ed - 6.10b": "N_Ed {6.10b}", "ULS1 (kN)": "", "P (kN)": "", "Level from / to": "Level ?", "Storey ht (m)": "Length [m]", "Eff. length y-y": "L_cr,y",
		"Eff. length factor z-z": "k_z", "Splice (Y/N)": "Splice", "z-z braced at": "Restraints z-z", "Section class": "", "Fy": "",
		"\u0301": "", "N_Ed \u0301": "N_Ed",
		"N": "N_Ed ?", "N (kN)": "N_Ed ? [kN]", "Load": "N_Ed ?",
	} {
		assert.Equal(t, want, say(readHeading(heading)), heading)
	}
}

// Every field is known by the name under which messages speak of it.
func TestFieldsKnowTheirOwnNames(t *testing.T) {
	for i := range fields {
		f := &fields[i]
		k := key{field: f.name}
		if f.needs&needsAxis != 0 {
			k.axis = zAxis
		}
		if f.needs&needsEnd != 0 {
			k.end = topEnd
		}
		if f.needs&needsBound != 0 {
			k.bound = greatest
		}
		m := readHeading(k.String())
		if assert.Len(t, m.keys, 1, k.String()) {
			assert.Equal(t, k, m.keys[0], k.String())
		}
	}
}
