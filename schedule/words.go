package schedule

import (
	"math"
	"strconv"

	"stanchion/design"
)

// checkNames name the checks for people and in the output.
var checkNames = map[design.Kind]string{
	design.Tension:             "tension",
	design.Compression:         "compression",
	design.BendingY:            "bending y-y",
	design.BendingZ:            "bending z-z",
	design.ShearZ:              "shear z-z",
	design.ShearY:              "shear y-y",
	design.CrossSection:        "cross-section",
	design.FlexuralY:           "flexural buckling y-y",
	design.FlexuralZ:           "flexural buckling z-z",
	design.Torsional:           "torsional buckling",
	design.TorsionalFlexural:   "torsional-flexural buckling",
	design.RestrainedAxis:      "buckling about the restrained axis",
	design.LateralTorsional:    "lateral-torsional buckling",
	design.Interaction661:      "interaction (6.61)",
	design.Interaction662:      "interaction (6.62)",
	design.SimpleConstruction:  "simple construction",
	design.SimpleConstructionY: "simple construction y-y",
	design.Refused:             "outside the rules",
}

// CheckName names a check for people and in the output.
func CheckName(k design.Kind) string { return checkNames[k] }

// AxisName names the governing axis of a check: y-y, z-z, torsional,
// torsional-flexural, lateral-torsional, cross-section or combined.
func AxisName(k design.Kind) string {
	switch k {
	case design.FlexuralY, design.SimpleConstructionY:
		return "y-y"
	case design.FlexuralZ:
		return "z-z"
	case design.Torsional:
		return "torsional"
	case design.TorsionalFlexural, design.RestrainedAxis:
		return "torsional-flexural"
	case design.LateralTorsional:
		return "lateral-torsional"
	case design.Tension, design.Compression, design.BendingY, design.BendingZ, design.ShearY, design.ShearZ, design.CrossSection:
		return "cross-section"
	case design.Interaction661, design.Interaction662, design.SimpleConstruction:
		return "combined"
	default:
		return ""
	}
}

// SegmentName writes the heights between which a segment lies, in m: "2.5-5.0".
func SegmentName(from, to float64) string { return heightName(from) + "-" + heightName(to) }

// heightName writes mm as m, with one decimal at least and to the mm.
func heightName(mm float64) string {
	m := math.Round(mm) / 1000
	if s := strconv.FormatFloat(m, 'f', -1, 64); len(s) > len(strconv.FormatFloat(m, 'f', 1, 64)) {
		return s
	}
	return strconv.FormatFloat(m, 'f', 1, 64)
}
