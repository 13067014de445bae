package schedule

import "strings"

// fieldHelp says in one line what a field is, for an empty schedule and for
// help.
var fieldHelp = map[fieldName]string{
	markField:        "the column's mark; rows without one are shown by their cell",
	stackField:       "grid reference that the lengths of one column line share",
	levelField:       "both levels in one cell: L1 to L2",
	fromField:        "level at the bottom of the length",
	toField:          "level at the top of the length",
	quantityField:    "pieces alike; blank is 1",
	combinationField: "the combination that the row gives actions of; rows of one mark and level are one member",
	lengthField:      "length between the ends",
	axialField:       "design axial force, compression positive; one column a combination is allowed (N_Ed ULS1, N_Ed ULS2), and one for the part above a height (N_Ed above 2.5 m)",
	momentField:      "design end moment from analysis; equal signs at both ends bend in single curvature",
	flangeAField:     "beam reaction at the top of the length on one flange, for nominal moments",
	flangeBField:     "beam reaction at the top of the length on the other flange",
	webAField:        "beam reaction at the top of the length on one side of the web",
	webBField:        "beam reaction at the top of the length on the other side of the web",
	lcrField:         "buckling length, where it is given outright",
	ltField:          "torsional buckling length, where it is given outright",
	factorField:      "effective-length factor on the whole length, where it is given outright",
	endsField:        "conditions of the two ends, the bottom first; blank is pinned-pinned",
	restraintsField:  "heights above the bottom that hold the column: 2.5; 5.0, 1/3 2/3, mid, thirds, quarters, every 1.5; blank is ends only",
	torsionField:     "heights that hold it against twist; blank: where z-z is held; ends: the ends alone",
	heldAtField:      "the z-z restraints hold one flange only and not the twist: yes, or their distance from the shear centre",
	sectionField:     "a section that is to stay; it is checked",
	gradeField:       "steel grade; several leave the choice open",
	familyField:      "family of sections to choose from; several are separated by commas",
	depthField:       "limit of the section's depth",
	widthField:       "limit of the section's width",
	thicknessField:   "limit of the flange or wall thickness",
	etaField:         "distribution factor of the joint, 0 fixed to 1 pinned, instead of an end condition",
	stiffnessField:   "rotational stiffness of what the end is joined to, instead of an end condition",
	fireLengthField:  "buckling length in fire",
	fireRatioField:   "action in fire over the ambient one, for this member",
	firePeriodField:  "required period of fire resistance",
	fireSidesField:   "sides exposed to fire",
	fireBoxField:     "protected in a box",
	limitField:       "greatest utilisation for this member",
	groupField:       "members of a group share one section",
	spliceField:      "the section may change above this length",
}

// fieldValues are the values of the fields that have few.
var fieldValues = map[fieldName][]string{
	endsField:      {"pinned-pinned", "fixed-pinned", "pinned-fixed", "fixed-fixed", "partly fixed", "fixed-guided", "fixed-partly guided", "fixed-free"},
	heldAtField:    {"yes", "no"},
	spliceField:    {"yes", "no"},
	fireBoxField:   {"yes", "no"},
	fireSidesField: {"3", "4"},
}

// Fields returns the fields of a schedule, in their order: one entry a heading.
func Fields() []FieldInfo {
	var list []FieldInfo
	for i := range fields {
		f := &fields[i]
		for _, k := range f.keys() {
			list = append(list, FieldInfo{
				Name: k.String(), Unit: f.of.defaultUnit().name, Meaning: fieldHelp[f.name], Allowed: fieldValues[f.name],
				Needed: f.name == lengthField || f.name == axialField, Spellings: f.spellings(k),
			})
		}
	}
	return list
}

// keys are all that the line of the table can supply, the bottom first.
func (f *field) keys() []key {
	list := []key{{field: f.name}}
	spread := func(n int, set func(*key, int)) {
		var wider []key
		for _, k := range list {
			for i := 1; i <= n; i++ {
				set(&k, i)
				wider = append(wider, k)
			}
		}
		list = wider
	}
	if f.needs&needsAxis != 0 {
		spread(2, func(k *key, i int) { k.axis = axis(i) })
	}
	if f.needs&needsEnd != 0 {
		spread(2, func(k *key, i int) { k.end = end(i) })
	}
	if f.needs&needsBound != 0 {
		spread(2, func(k *key, i int) { k.bound = bound(i) })
	}
	return list
}

// spellings lists the headings that name a key, those that suggest it last.
func (f *field) spellings(k key) []string {
	var list []string
	for _, s := range strings.Split(f.exact+"|"+f.suggest, "|") {
		if s != "" {
			list = append(list, strings.ReplaceAll(s, "%", axisLetters[k.axis]))
		}
	}
	return list
}
