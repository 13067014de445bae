package ec3_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
)

// he260a has the printed properties of the European table.
func he260a() *catalogue.Section {
	return &catalogue.Section{Designation: "HE 260 A", Shape: catalogue.ShapeI,
		H: 250, B: 260, Tw: 7.5, Tf: 12.5, R: 24, Mass: 68.2,
		Properties: catalogue.Properties{A: 8680, Iy: 104.5e6, Iz: 36.68e6, It: 52.4e4, Iw: 516.4e9}}
}

// Access Steel SX002a-EN-EU, pinned column with intermediate restraints, from
// memory: N_b,y,Rd = 1193 kN about y-y over 10.5 m, S235.
func TestPinnedColumnWithIntermediateRestraints(t *testing.T) {
	set := design.Settings{National: ec3.NationalSets()[1]}
	g, err := material.Parse("S235")
	require.NoError(t, err)
	c, err := ec3.NewCandidate(he260a(), g, &set)
	require.NoError(t, err)
	m, err := ec3.NewMember(&design.Column{Length: 10500,
		Z:            design.Hold{Restraints: []float64{3500, 7000}},
		Combinations: []design.Combination{{NEd: 1000e3}}}, &set)
	require.NoError(t, err)
	var a ec3.Assessment
	m.Assess(c, &a)
	assert.InEpsilon(t, 1193e3, a.Y.NbRd, 0.005)
	assert.InEpsilon(t, 6206e3, a.Z.Ncr, 0.005)
	assert.Equal(t, design.FlexuralY, a.Governing.Kind)
}
