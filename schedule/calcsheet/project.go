package calcsheet

import (
	"path/filepath"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
)

// Project is what stands in the title block and on the first page.
type Project struct {
	Title    string // of the job; empty: the name of the file without its ending
	File     string // the schedule
	Sheet    string // its sheet; empty: none
	SHA256   string // of the schedule; empty: not known
	Program  string // name and version
	Standard string
	National design.National
	Paper    schedule.Paper
	Settings [][2]string // name and value of what the run used
	Missing  []Missing   // members that have no sheet
}

// Missing is a member without a calculation sheet.
type Missing struct {
	Column *design.Column
	Status design.Status
	Why    string
}

func (p *Project) title() string {
	if p.Title != "" {
		return p.Title
	}
	return strings.TrimSuffix(p.File, filepath.Ext(p.File))
}
