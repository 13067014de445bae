package material

// bands are yield strengths by nominal thickness: fy[i] holds for t <= upTo[i]
// and above the band before.
type bands struct {
	standard string
	upTo     []float64
	fy       map[int][]float64 // by nominal strength
}

// The product standards. Every value is from memory; testdata holds the rows
// that were read in a publication.
var (
	en10025p2 = bands{"EN 10025-2", []float64{16, 40, 63, 80, 100, 150}, map[int][]float64{
		235: {235, 225, 215, 215, 215, 195},
		275: {275, 265, 255, 245, 235, 225},
		355: {355, 345, 335, 325, 315, 295},
		450: {450, 430, 410, 390, 380, 380},
	}}
	en10025p3 = bands{"EN 10025-3", []float64{16, 40, 63, 80, 100, 150}, map[int][]float64{
		275: {275, 265, 255, 245, 235, 225},
		355: {355, 345, 335, 325, 315, 295},
		420: {420, 400, 390, 370, 360, 340},
		460: {460, 440, 430, 410, 400, 380},
	}}
	// The last band of EN 10025-4 ends at 120 mm for plates and at 150 mm for
	// long products, which sections are.
	en10025p4 = bands{"EN 10025-4", []float64{16, 40, 63, 80, 100, 150}, map[int][]float64{
		275: {275, 265, 255, 245, 245, 240},
		355: {355, 345, 335, 325, 325, 320},
		420: {420, 400, 390, 380, 370, 365},
		460: {460, 440, 430, 410, 400, 385},
	}}
	en10210 = bands{"EN 10210-1", []float64{16, 40, 63, 80, 100, 120}, map[int][]float64{
		235: {235, 225, 215, 215, 215, 195},
		275: {275, 265, 255, 245, 235, 225},
		355: {355, 345, 335, 325, 315, 295},
	}}
	en10210FineGrain = bands{"EN 10210-1", []float64{16, 40, 65}, map[int][]float64{
		275: {275, 265, 255},
		355: {355, 345, 335},
		420: {420, 400, 390},
		460: {460, 440, 430},
	}}
	en10219 = bands{"EN 10219-1", []float64{16, 40}, map[int][]float64{
		235: {235, 225},
		275: {275, 265},
		355: {355, 345},
		420: {420, 400},
		460: {460, 440},
	}}
)

// EN 1993-1-1:2005 Table 3.1, from memory.
var (
	table31NonAlloy = bands{"EN 1993-1-1 Table 3.1", []float64{40, 80}, map[int][]float64{
		235: {235, 215},
		275: {275, 255},
		355: {355, 335},
		450: {440, 410},
	}}
	table31FineGrain = bands{"EN 1993-1-1 Table 3.1", []float64{40, 80}, map[int][]float64{
		275: {275, 255},
		355: {355, 335},
		420: {420, 390},
		460: {460, 430},
	}}
	table31Hot = bands{"EN 1993-1-1 Table 3.1", []float64{40, 80}, map[int][]float64{
		235: {235, 215},
		275: {275, 255},
		355: {355, 335},
	}}
	table31Cold = bands{"EN 1993-1-1 Table 3.1", []float64{40}, map[int][]float64{
		235: {235},
		275: {275},
		355: {355},
		420: {420},
		460: {460},
	}}
)
