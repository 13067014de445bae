package schedule

import "strings"

// fieldName names a field of the schedule. Fields that exist for two axes or
// two ends have one name; key tells them apart.
type fieldName uint8

const (
	noField fieldName = iota
	markField
	stackField
	levelField // one column for both levels
	fromField
	toField
	quantityField
	combinationField
	lengthField
	axialField
	momentField
	flangeAField
	flangeBField
	webAField
	webBField
	lcrField
	ltField
	factorField
	endsField
	restraintsField
	torsionField
	heldAtField
	sectionField
	gradeField
	familyField
	depthField
	widthField
	thicknessField
	etaField
	stiffnessField
	fireLengthField
	fireRatioField
	firePeriodField
	fireSidesField
	fireBoxField
	limitField
	groupField
	spliceField
	fieldCount
)

// axis, end and bound tell apart the columns of one field.
type (
	axis  uint8
	end   uint8
	bound uint8
)

const (
	noAxis axis = iota
	yAxis
	zAxis
	bothAxes
	xAxis       // the major axis of older British notation, or twist: never read silently
	torsionAxis // "torsion", "twist"
)

const (
	noEnd end = iota
	bottomEnd
	topEnd
	bothEnds // one column for a value that is the same at both
)

const (
	noBound bound = iota
	least
	greatest
)

// needs are the parts that a heading must or may have beside the noun.
type needs uint16

const (
	needsAxis      needs = 1 << iota // y-y or z-z
	axisFromBoth                     // without an axis it is meant for both
	needsEnd                         // bottom or top
	endFromBoth                      // without an end it is meant for both
	mayHaveEnd                       // one end, or both in one cell
	needsBound                       // greatest or least
	perCombination                   // the heading may name a combination
	isLabel                          // text that is shown and told apart, never counted with
	perHeight                        // the heading may name a height: "above 2.5 m"
	lenient                          // the noun means no other field, whatever stands beside it
)

// field is one line of the field table.
type field struct {
	name    fieldName
	title   string // as the program writes it: % stands for the axis, & for end or bound
	of      quantity
	needs   needs
	exact   string // spellings that name the field, parted by "|"; % stands for the axis
	suggest string // spellings that may mean it; a column with an exact one beats them
}

// fields is the field table: one line a field. Spellings are matched without
// case, punctuation, spaces, accents; axis, end, unit, combination and words
// that say nothing (noise) may stand before or behind them.
var fields = []field{
	{markField, "Mark", noQuantity, isLabel, "mark|column mark|member mark|mark no|col no|col nr|col mark|col ref|col id|stanchion|stanchion no|stanchion mark|column nr|member nr|column no|column number|column id|column ref|column reference|member ref|member no|member id|member name|column name|marke|stutze|stutze nr|repere|poteau", "column|columns|col|ref|reference|ref no|member|id|name|tag|pos|position|pilastro|pilar"},
	{stackField, "Stack", noQuantity, isLabel, "stack|grid|grid ref|grid reference|grid line|gridline|grid position|column line|column stack", "location|line|achse|axe"},
	{levelField, "Level", noQuantity, isLabel, "", "level|levels|storey|story|lift|floor|floors|geschoss|etage|niveau|piano|planta"},
	{fromField, "Level from", noQuantity, isLabel, "from|level from|from level|from floor|base level|bottom level|lower level|lower floor|level base|level bottom|level lower|floor from|start level|bottom floor|from storey", ""},
	{toField, "Level to", noQuantity, isLabel, "to|level to|to level|to floor|top level|upper level|upper floor|level top|level upper|floor to|end level|top floor|to storey", ""},
	{quantityField, "Quantity", count, 0, "quantity|qty|no off|number off|no of|number of|no of columns|number of columns|no of pieces|number of pieces|pieces|pcs|count|anzahl|stuckzahl|quantite|quantita|cantidad", "no|nr|number|nos|off|stk|stuck"},
	{combinationField, "Combination", noQuantity, isLabel, "combination|combo|load combination|load combo|uls case|uls combination|combination name|combination no|load comb|comb|lastkombination|lfk|combinaison|combinazione|combinacion", "load case|loadcase|case|lc|lastfall"},
	{lengthField, "Length", length, 0, "length|column length|member length|l|lange|stablange|longueur|lunghezza|longitud|height|storey height|story height|storey ht|ht|column height|member height|floor height|floor to floor height|system length|clear height|clear length|overall length|hohe|hauteur|altezza|altura|stutzenlange|stutzenhohe", ""},
	{axialField, "N_Ed", force, perCombination | perHeight, "ned|nsd|axial|axial load|axial force|factored axial|uls axial|design axial|axial ned|normalkraft|effort normal|sforzo normale|axil|normal force|axial compression|compression force|axial action", "n|load|force|compression|column load|fc"},
	{momentField, "M_%,Ed &", moment, needsAxis | needsEnd | endFromBoth | perCombination, "m%|m%%|m%ed|m%%ed|med%|med%%|m%sd|moment|bending moment|bending|med|moment med|biegemoment|momento|momento flettente", ""},
	{flangeAField, "Reaction flange A", force, perCombination, "reaction flange a|flange a reaction|beam reaction flange a|r flange a|flange reaction a|reaction a flange", "flange a"},
	{flangeBField, "Reaction flange B", force, perCombination, "reaction flange b|flange b reaction|beam reaction flange b|r flange b|flange reaction b|reaction b flange", "flange b"},
	{webAField, "Reaction web A", force, perCombination, "reaction web a|web a reaction|beam reaction web a|r web a|web reaction a|reaction a web", "web a"},
	{webBField, "Reaction web B", force, perCombination, "reaction web b|web b reaction|beam reaction web b|r web b|web reaction b|reaction b web", "web b"},
	{lcrField, "L_cr,%", length, needsAxis | axisFromBoth | lenient, "lcr%|lcr%%|l%cr|lcr|effective length|eff length|buckling length|le%|le%%|leff%|leff%%|leff|effective buckling length|critical length|knicklange|longueur de flambement|lunghezza di inflessione|longitud de pandeo|sk%", "l%|l%%|unbraced length|unsupported length|unrestrained length"},
	{ltField, "L_T", length, lenient, "lt|lcrt|torsional length|torsional buckling length|torsion length|effective length torsion|effective length torsional|buckling length torsion|ltorsion", ""},
	{factorField, "k_%", ratio, needsAxis | axisFromBoth | lenient, "k%|k%%|effective length factor|eff length factor|buckling length factor|buckling factor|length factor|k factor|keff%|knickbeiwert|effective length factor k%|effective length factor k", "k"},
	{endsField, "Ends %", noQuantity, needsAxis | axisFromBoth | mayHaveEnd | lenient, "ends|end|end conditions|end condition|end fixity|end fixities|fixity|supports|end supports|end restraint|lagerung", ""},
	{restraintsField, "Restraints %", length, needsAxis | lenient, "restraints|restraint|restraint heights|restraint height|restrained at|intermediate restraints|lateral restraints|restraint positions|restraints at|held at|braced at|bracing|bracing points|bracing heights|brace points|lateral supports|restrained", ""},
	{torsionField, "Restraints torsion", length, lenient, "torsion restraints|torsional restraints|torsion restraint|torsional restraint|restraints torsion|restraints torsional|restraint torsion|twist restraints|restraints twist|restraint twist|torsion held at|restraints against twist", ""},
	{heldAtField, "z-z held at flange", size, 0, "z z held at flange|zz held at flange|flange holds z z|z z restraints at flange|zz restraints at flange", ""},
	{sectionField, "Section", noQuantity, 0, "section|section size|serial size|size|section name|column section|member section|column size|member size|given section|profile|profil|profile|sezione|perfil|section designation|designation", "existing section|proposed section|proposed size|existing size|given size|fixed section|adopted section|uc size|ub size|uc section|ub section"},
	{gradeField, "Grade", noQuantity, 0, "grade|steel grade|steel|stahlsorte|stahlgute|nuance|classe acciaio|acero", "material|section grade"},
	{familyField, "Family", noQuantity, 0, "family|section type|section family|section families|families|profile type|section series", "series"},
	{depthField, "& depth", size, needsBound, "depth|section depth|overall depth|h", "height of section"},
	{widthField, "& width", size, needsBound, "width|section width|overall width|breadth|b", ""},
	{thicknessField, "& thickness", size, needsBound, "thickness|flange thickness|wall thickness|wall|flange or wall thickness|t", ""},
	{etaField, "eta % &", ratio, needsAxis | axisFromBoth | needsEnd | endFromBoth, "eta|distribution factor|eta%|eta%%|joint distribution factor", ""},
	{stiffnessField, "Stiffness % &", stiffness, needsAxis | needsEnd | endFromBoth, "stiffness|rotational stiffness|end stiffness|joint stiffness|spring stiffness|rotational spring", ""},
	{fireLengthField, "L_fi,%", length, needsAxis | axisFromBoth | lenient, "lfi%|lfi%%|l%fi|lcrfi%|lcr%fi|lfi|fire buckling length|buckling length in fire|buckling length fire|effective length in fire|effective length fire|fire effective length|fire length", ""},
	{fireRatioField, "eta_fi", ratio, 0, "eta fi|etafi|fire load ratio|load ratio in fire|load level in fire|etafit", ""},
	{firePeriodField, "Fire period", minutes, 0, "fire period|fire resistance|required fire resistance|fire rating|fire resistance period", ""},
	{fireSidesField, "Sides exposed", count, 0, "sides exposed|exposed sides|fire sides", ""},
	{fireBoxField, "Boxed", noQuantity, 0, "boxed|fire box|boxed protection|box protection", ""},
	{limitField, "Utilisation limit", ratio, 0, "utilisation limit|utilization limit|max utilisation|max utilization|maximum utilisation|maximum utilization|utilisation max|greatest utilisation|limit utilisation|target utilisation|allowable utilisation", "limit|max ur|ur limit"},
	{groupField, "Group", noQuantity, isLabel, "group|group no|grp|column group|section group|member group|design group|grouping|gruppe|groupe|gruppo|grupo", ""},
	{spliceField, "Splice", noQuantity, 0, "splice|splice above|spliced|splice at top|splice over|stoss", ""},
}

// key is one thing that a column can supply.
type key struct {
	field fieldName
	axis  axis
	end   end
	bound bound
}

// plain is the field's title without axis, end and bound.
func (f *field) plain() string {
	return strings.TrimSpace(strings.NewReplacer("_%,", "_", ",%", "", "_%", "", "%", "", "&", "").Replace(f.title))
}

var fieldTable = func() (t [fieldCount]*field) {
	for i := range fields {
		t[fields[i].name] = &fields[i]
	}
	return t
}()

func (k key) line() *field { return fieldTable[k.field] }

var (
	axisTitles  = [...]string{"", "y-y", "z-z", "y-y and z-z", "x-x", "torsion"}
	axisLetters = [...]string{"", "y", "z", "y and z", "x", "T"}
	endTitles   = [...]string{"", "bottom", "top", "bottom and top"}
	boundTitles = [...]string{"", "Least", "Greatest"}
)

// String returns the field as the program writes it: "M_y,Ed top".
func (k key) String() string {
	f := k.line()
	if f == nil {
		return "nothing"
	}
	ax := axisTitles[k.axis]
	if strings.Contains(f.title, "_%") || strings.Contains(f.title, ",%") {
		ax = axisLetters[k.axis]
	}
	which := endTitles[k.end]
	if f.needs&needsBound != 0 {
		which = boundTitles[k.bound]
	}
	title := strings.NewReplacer("%", ax, "&", which).Replace(f.title)
	if k.field == endsField && k.end != noEnd {
		title += " " + which
	}
	return strings.TrimRight(title, " ")
}
