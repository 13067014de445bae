package schedule

import "strings"

// word is what a run of tokens in a heading means.
type word struct {
	kind  wordKind
	field fieldName // of a noun
	axis  axis
	end   end
	bound bound
	exact bool // the noun names its field, where others only suggest it
	weak  bool // the noun is one only where no other stands beside it
	firm  bool // the noun is the symbol of a design value
}

type wordKind uint8

const (
	unknownWord wordKind = iota
	noun
	axisWord
	endWord
	boundWord
	fireWord
	noiseWord
	vetoWord
)

const maxPhrase = 7 // tokens of the longest spelling

// vocabulary maps compact spellings to their meaning.
var vocabulary = buildVocabulary()

func buildVocabulary() map[string]word {
	v := map[string]word{}
	addWords(v, word{kind: noiseWord}, noiseWords)
	addWords(v, word{kind: vetoWord}, vetoWords)
	addWords(v, word{kind: fireWord}, "fire|fi|in fire|brand")
	addWords(v, word{kind: axisWord, axis: yAxis}, "y|yy|y axis|yy axis|about y|about yy|axis y|axis yy|major|major axis|strong|strong axis|starke achse")
	addWords(v, word{kind: axisWord, axis: zAxis}, "z|zz|z axis|zz axis|about z|about zz|axis z|axis zz|minor|minor axis|weak|weak axis|schwache achse")
	addWords(v, word{kind: axisWord, axis: xAxis}, "x|xx|x axis|xx axis|about x|about xx|axis x|axis xx")
	addWords(v, word{kind: axisWord, axis: bothAxes}, "both axes|both|y and z|yy and zz|y y and z z|yz|yyzz|either axis|about both axes")
	addWords(v, word{kind: axisWord, axis: torsionAxis}, "torsion|torsional|twist")
	addWords(v, word{kind: endWord, end: topEnd}, "top|at top|top end|upper|upper end|head|oben|haut")
	addWords(v, word{kind: endWord, end: bottomEnd}, "bottom|at bottom|bottom end|btm|bot|lower|lower end|base|foot|unten|bas")
	addWords(v, word{kind: endWord, end: bothEnds}, "both ends|top and bottom|bottom and top|top bottom")
	addWords(v, word{kind: boundWord, bound: greatest}, "max|maximum|greatest|largest|upper limit|not more than")
	addWords(v, word{kind: boundWord, bound: least}, "min|minimum|least|smallest|lower limit|not less than")
	for i := range fields {
		addField(v, &fields[i])
	}
	return v
}

func addWords(v map[string]word, w word, list string) {
	for _, s := range strings.Split(list, "|") {
		v[compact(s)] = w
	}
}

// addField adds the spellings of one line of the field table.
func addField(v map[string]word, f *field) {
	for i, list := range []string{f.suggest, f.exact} {
		for _, s := range strings.Split(list, "|") {
			if s == "" {
				continue
			}
			w := word{kind: noun, field: f.name, exact: i == 1, weak: weakNouns[compact(s)]}
			if !strings.Contains(s, "%") {
				w.firm = firmNouns[compact(s)]
				v[compact(s)] = w
				continue
			}
			for _, a := range []axis{xAxis, yAxis, zAxis} {
				w.axis, w.firm = a, true
				v[compact(strings.ReplaceAll(s, "%", axisLetters[a]))] = w
			}
		}
	}
}

// weakNouns name a field where they stand alone, and say nothing beside
// another: "Column length" is a length, "Load N_Ed" an N_Ed.
var weakNouns = compactSet("column|columns|col|member|ref|reference|id|name|no|nr|number|nos|off|level|levels|floor|floors|storey|story|from|to|load|force|steel|n|l|h|b|t|case|profile|position|compression|end|ends|k")

// firmNouns are symbols of a design value: what stands beside them names a
// combination.
var firmNouns = compactSet("ned|nsd|med")

func compactSet(list string) map[string]bool {
	set := map[string]bool{}
	for _, s := range strings.Split(list, "|") {
		set[compact(s)] = true
	}
	return set
}

// noiseWords say nothing about the field.
const noiseWords = "the|of|at|for|in|on|and|or|a|an|as|design|designed|factored|ultimate|value|values|applied|acting|given|input|required|ed|d|per|each|about|axis|axes|direction|dir|loads|forces|actions|geometry|data|project|schedule|details|text|info|between|along|within|intermediate"

// otherWords make something else even of a heading whose noun is plain.
var otherWords = compactSet("capacity|resistance|rd|ratio|utilisation|utilization|modulus|area|inertia|radius|slenderness|curve|beam|beams|bolt|bolts|weld|plate|check|remarks|remark|comment|comments|notes|note")

// vetoWords turn a heading into something else: an action that is not a
// design value, or one no longer valid.
const vetoWords = "sls|service|serviceability|unfactored|unfact|characteristic|char|dead|dead load|live|live load|imposed|imposed load|permanent|variable|gk|qk|ng|nq|superseded|previous|old|former|working load|nominal|g|q|gq|sdl"

// combinationWords stand in the name of a combination.
var combinationWords = compactSet("uls|lc|combo|comb|combination|co|case|str|equ|geo|set|eq|lk|lfk|max|min|wind|snow|maximum|minimum|acc|accidental|persistent|transient|seismic|construction|temporary|exceptional")
