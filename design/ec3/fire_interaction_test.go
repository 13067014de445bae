package ec3_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/design/ec3"
)

// Each expression of EN 1993-1-2 4.2.3.5 worked by hand, and its limits.
func TestFireInteractionByHand(t *testing.T) {
	const printed = 5e-4 // hand values are written to three places

	assert.InDelta(t, 1.1, ec3.FireBetaM(1), 1e-12)
	assert.InDelta(t, 1.8, ec3.FireBetaM(0), 1e-12)
	assert.InDelta(t, 2.5, ec3.FireBetaM(-1), 1e-12)

	// mu_LT = 0.15 x 1.2 x 1.8 - 0.15 = 0.174
	assert.InDelta(t, 1-0.174*0.5, ec3.FireKLT(1.2, 1.8, 0.5), printed)
	// mu_LT = 0.15 x 0.5 x 1.1 - 0.15 < 0: k_LT is limited to 1
	assert.Equal(t, 1.0, ec3.FireKLT(0.5, 1.1, 0.5))
	// mu_LT is limited to 0.9
	assert.InDelta(t, 1-0.9*0.5, ec3.FireKLT(3, 2.5, 0.5), printed)

	// mu_y = (1.2 x 1.8 - 3) 0.9 + 0.44 x 1.8 - 0.29 = -0.254
	assert.InDelta(t, 1+0.254*0.5, ec3.FireKy(0.9, 1.8, 0.5), printed)
	// mu_y = (1.2 x 2.5 - 3) 0.9 + 0.44 x 2.5 - 0.29 = 0.81: limited to 0.8
	assert.InDelta(t, 1-0.8*0.5, ec3.FireKy(0.9, 2.5, 0.5), printed)
	// mu_y = (1.2 x 1.1 - 3) 2.5 + 0.44 x 1.1 - 0.29 = -4.006: k_y is limited to 3
	assert.Equal(t, 3.0, ec3.FireKy(2.5, 1.1, 0.9))

	// mu_z = (2 x 1.8 - 5) 0.9 + 0.44 x 1.8 - 0.29 = -0.758
	assert.InDelta(t, 1+0.758*0.5, ec3.FireKz(0.9, 1.8, 0.5), printed)
	// lambda_z is limited to 1.1
	assert.Equal(t, ec3.FireKz(1.1, 1.8, 0.5), ec3.FireKz(2, 1.8, 0.5))
}
