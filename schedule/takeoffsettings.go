package schedule

import (
	"errors"
	"fmt"
	"math"
	"strings"
)

// TakeOff is what the settings say of the take-off alone.
type TakeOff struct {
	Connections float64 // allowance for plates, bolts and welds, as a part of the net mass
	Waste       float64 // allowance for cutting, as a part of the net mass
	Transport   float64 // longest piece that can be brought, mm; 0: not limited
}

// takeOffSettings are lines of the settings table.
func takeOffSettings() []setting {
	return []setting{
		partSetting("connections", "connections|connection allowance|allowance for connections", func(s *Settings) *float64 { return &s.TakeOff.Connections }),
		partSetting("waste", "waste|waste allowance|allowance for waste", func(s *Settings) *float64 { return &s.TakeOff.Waste }),
		transportSetting(),
	}
}

// maxPart is the greatest allowance. A cell that a spreadsheet shows in per
// cent holds the part itself, and 1 % is more than anything below the bound
// between the two can mean.
const maxPart = 0.5

// partSetting is an allowance of the take-off, in per cent.
func partSetting(name, spellings string, field func(*Settings) *float64) setting {
	return setting{name, spell(spellings), "0", "per cent of the net mass, for the take-off: 6 %, 6, or 0.06 as a cell holds it",
		func(r *settingsReader, v string) error {
			x, err := settingNumber(v, 0, 100*maxPart)
			if err == nil && x >= 1 && !strings.Contains(v, "%") {
				x /= 100
			}
			if err != nil || x > maxPart {
				return errors.New("give a percentage from 0 to 50 %")
			}
			*field(r.set) = x
			return nil
		},
		func(s *Settings) string {
			if *field(s) == 0 {
				return "0"
			}
			return fmt.Sprintf("%s %%", trimZeros(math.Round(*field(s)*1e8)/1e6))
		}}
}

// transportSetting is the longest piece that can be brought, in m.
func transportSetting() setting {
	s := offSetting("transport length", "transport length|transport limit|longest piece", 1, 100, func(s *Settings) *float64 { return &s.TakeOff.Transport }, "off")
	number := s.apply
	s.values = "off, or the longest piece that can be brought, m, for the take-off"
	s.apply = func(r *settingsReader, v string) error {
		v = strings.TrimSuffix(strings.TrimSpace(v), "m")
		if err := number(r, strings.TrimSpace(v)); err != nil {
			return fmt.Errorf("%w, in m", err)
		}
		r.set.TakeOff.Transport *= 1000
		return nil
	}
	s.show = func(s *Settings) string {
		if s.TakeOff.Transport == 0 {
			return "off"
		}
		return showNumber(s.TakeOff.Transport/1000) + " m"
	}
	return s
}

func trimZeros(x float64) string { return strings.TrimSuffix(showNumber(x), ".00") }
