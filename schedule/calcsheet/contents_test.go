package calcsheet

import (
	"bytes"
	"fmt"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// Wherever the list of sheets ends, the members that have none stand under
// their heading, and nothing stands below the foot of the page.
func TestMembersWithoutASheetStandUnderTheirHeading(t *testing.T) {
	const foot = (bodyBottom + 0.4*listSize) / pt // points, with what hangs below the last line
	member := regexp.MustCompile(`^(M\d\d.*|said)$`)
	for left := 0.0; left < 30; left += 3 {
		p := project()
		for i := range 70 {
			p.Missing = append(p.Missing, Missing{Column: &design.Column{Mark: fmt.Sprintf("M%02d", i)}, Why: strings.Repeat("so it is said ", i%17)})
		}
		d := newDocument(p, 0)
		d.page("Contents")
		d.missing(bodyBottom - left)
		var b bytes.Buffer
		require.NoError(t, d.pdf.Output(&b))
		for i, page := range pageTexts(t, b.Bytes()) {
			members := strings.Count(page, "X1, L1:") + strings.Count(page, "\nM")
			assert.Equal(t, members > 0, strings.Contains(page, "Members without a sheet"), "page %d with %g mm left on the first", i+1, left)
		}
		for word, at := range wordPlaces(t, b.Bytes()) {
			if member.MatchString(word) {
				for _, box := range at {
					assert.Less(t, box[3], foot, word)
				}
			}
		}
	}
}
