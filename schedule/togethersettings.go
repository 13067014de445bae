package schedule

import (
	"fmt"
	"strconv"
	"strings"
	"time"

	"stanchion/design/building"
)

// Together is what the settings say of decisions that concern many columns at
// once.
type Together struct {
	building.Options
	Reserve   bool   // find by how much the axial force of sized columns could still grow
	Reclaimed string // file of the pieces at hand; empty: none
}

// togetherSettings are lines of the settings table.
func togetherSettings() []setting {
	return []setting{
		{"splices", spell("splices|splice"), "as scheduled", "as scheduled, every N (lengths of a stack), where it pays", applySplices, showSplices},
		offSetting("splice cost", "splice cost|cost of a splice", 0.001, 1e6, func(s *Settings) *float64 { return &s.Together.SpliceCost }, "0"),
		sizesSetting(),
		timeSetting(),
		{"reserve", spell("reserve|reserves"), "off", "off, on: by how much N_Ed could still grow (check always finds it)", applyReserve, showReserve},
		{"reclaimed", spell("reclaimed|reclaimed steel|steel at hand|pieces at hand"), "", "a CSV of pieces at hand: section, grade, number, length_m", func(r *settingsReader, v string) error { r.set.Together.Reclaimed = v; return nil }, func(s *Settings) string { return s.Together.Reclaimed }},
	}
}

// applySplices reads where the section of a stack may change.
func applySplices(r *settingsReader, v string) error {
	t := &r.set.Together
	words := strings.Fields(strings.ToLower(v))
	switch folded := foldSetting(v); {
	case oneOf(folded, "asscheduled", "scheduled"):
		t.Splices, t.Every = building.AsScheduled, 0
		return nil
	case oneOf(folded, "whereitpays", "whereverpays", "wherepays"):
		t.Splices, t.Every = building.WhereItPays, 0
		return nil
	case len(words) >= 2 && words[0] == "every":
		digits := strings.TrimRight(words[1], "abcdefghijklmnopqrstuvwxyz-") // 2nd
		if n, err := strconv.Atoi(digits); err == nil && n >= 1 && n <= 1000 {
			t.Splices, t.Every = building.EveryNth, n
			return nil
		}
	}
	return fmt.Errorf("give as scheduled, every 2 (or another number of lengths), or where it pays")
}

func showSplices(s *Settings) string {
	switch t := &s.Together; t.Splices {
	case building.EveryNth:
		return "every " + strconv.Itoa(t.Every)
	case building.WhereItPays:
		return "where it pays"
	}
	return "as scheduled"
}

// mostSizes is the greatest limit on sizes that can be meant: catalogues have
// fewer sections.
const mostSizes = 1000

// sizesSetting is the greatest number of different sections.
func sizesSetting() setting {
	return setting{"sizes", spell("sizes|most sizes|number of sizes|sections in use"), "any", "any, or the most different sections in the project (a section in two grades counts once)",
		func(r *settingsReader, v string) error {
			n := 0
			if !oneOf(strings.ToLower(v), "any", "off", "all") {
				var err error
				if n, err = strconv.Atoi(v); err != nil || n < 1 || n > mostSizes {
					return fmt.Errorf("give any, or a whole number from 1 to %d", mostSizes)
				}
			}
			r.set.Together.MostSizes = n
			return nil
		},
		func(s *Settings) string {
			if s.Together.MostSizes == 0 {
				return "any"
			}
			return strconv.Itoa(s.Together.MostSizes)
		}}
}

// timeSetting is how long a choice of few sizes may be looked for.
func timeSetting() setting {
	seconds := func(s *Settings) float64 { return s.Together.TimeLimit.Seconds() }
	return setting{"time for sizes", spell("time for sizes|time limit for sizes"), "120", "off, or seconds after which the best few sizes found so far stand, with their gap",
		func(r *settingsReader, v string) error {
			r.set.Together.TimeLimit = 0
			if oneOf(strings.ToLower(v), "off", "none") {
				return nil
			}
			x, err := settingNumber(strings.TrimSpace(strings.TrimSuffix(v, "s")), 0.1, 1e5)
			r.set.Together.TimeLimit = time.Duration(x * float64(time.Second))
			return err
		},
		func(s *Settings) string {
			if s.Together.TimeLimit == 0 {
				return "off"
			}
			return strconv.FormatFloat(seconds(s), 'f', -1, 64)
		}}
}

func applyReserve(r *settingsReader, v string) error {
	switch strings.ToLower(v) {
	case "on", "yes", "true", "1":
		r.set.Together.Reserve = true
	case "off", "no", "false", "0":
		r.set.Together.Reserve = false
	default:
		return fmt.Errorf("give on or off")
	}
	return nil
}

func showReserve(s *Settings) string {
	if s.Together.Reserve {
		return "on"
	}
	return "off"
}
