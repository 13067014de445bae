package catalogue

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// What the section tables print of channels beyond testdata. All values are
// from memory: UK channels from SCI P363 (e0 from the middle of the web, cm;
// Wpl,z, cm3), UPE from the European manufacturers' tables to EN 10365 (y_m from the
// centroid, cm; It, cm4).
func TestChannelsAgreeWithHandbooks(t *testing.T) {
	for name, e0 := range map[string]float64{
		"430x100x64": 3.27, "380x100x54": 3.48, "300x100x46": 3.68, "300x90x41": 3.18, "260x90x35": 3.32, "260x75x28": 2.62,
		"230x90x32": 3.46, "230x75x26": 2.78, "200x90x30": 3.60, "200x75x23": 2.91, "180x90x26": 3.64, "180x75x20": 2.87,
		"150x90x24": 3.71, "150x75x18": 2.99, "100x50x10": 1.94,
	} {
		s, err := Default().Find(name+" UKPFC", FindOptions{})
		require.NoError(t, err)
		c, hs := s.Cz-s.Tw/2, s.H-s.Tf
		assert.InDelta(t, e0, hs*hs*s.A*c/(4*s.Iy)/10, 0.0051, "%s: e0 by the UK tables' own expression", name)
		assert.InEpsilon(t, e0*10+c, s.Y0, 0.02, "%s: y0 on the middle lines is 1 to 2 %% further out", name)
	}
	for name, wplz := range map[string]float64{"430x100x64": 176, "260x90x35": 102, "200x90x30": 94.5} {
		s, err := Default().Find(name+" UKPFC", FindOptions{})
		require.NoError(t, err)
		assert.InEpsilon(t, wplz, s.WplZ/1e3, 0.005, "%s Wpl,z", name)
	}
	for name, v := range map[string]struct{ ym, it float64 }{
		"UPE 80": {3.71, 1.47}, "UPE 100": {3.93, 2.01}, "UPE 120": {4.12, 2.90}, "UPE 140": {4.54, 4.05}, "UPE 160": {4.76, 5.20},
		"UPE 180": {5.19, 6.99}, "UPE 200": {5.41, 8.89}, "UPE 220": {5.70, 12.1}, "UPE 240": {5.91, 15.1}, "UPE 270": {6.14, 19.9},
		"UPE 300": {6.03, 31.5}, "UPE 330": {6.00, 45.2},
	} {
		s, err := Default().Find(name, FindOptions{})
		require.NoError(t, err)
		assert.InEpsilon(t, v.ym, s.Y0/10, 0.005, "%s y_m", name)
		assert.InEpsilon(t, v.it, s.It/1e4, 0.01, "%s It", name)
	}
}
