package ec3

import (
	"fmt"
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// Values of the heat transfer. EN 1991-1-2:2002 3.1 and 3.2.1,
// EN 1993-1-2:2005 2.2(2) and 4.2.5.1.
const (
	stefanBoltzmann  = 5.67e-8 // W/m2K4
	emissivitySteel  = 0.7
	emissivityFire   = 1.0
	convection       = 25.0       // W/m2K, standard fire
	heatingStep      = 5.0        // s, the longest that 4.2.5.1(4) allows
	heatingLimit     = 8 * 3600.0 // s: nothing is asked for beyond
	leastSectionRate = 10.0       // 1/m: A_m/V is not taken as less, 4.2.5.1(5)
)

// StandardFire returns the gas temperature, C, of the standard
// temperature-time curve after t seconds. EN 1991-1-2:2002 (3.4).
func StandardFire(t float64) float64 { return 20 + 345*math.Log10(8*t/60+1) }

// SpecificHeat returns the specific heat of steel, J/kgK, at a temperature, C.
// EN 1993-1-2:2005 3.4.1.2, (3.2a) to (3.2d).
func SpecificHeat(theta float64) float64 {
	switch {
	case theta < 600:
		return 425 + theta*(7.73e-1+theta*(-1.69e-3+theta*2.22e-6))
	case theta < 735:
		return 666 + 13002/(738-theta)
	case theta < 900:
		return 545 + 17820/(theta-731)
	}
	return 650
}

// heatFlux returns the net heat flux, W/m2, from gas to steel, both in C.
// EN 1991-1-2:2002 (3.1) to (3.3), configuration factor 1.
func heatFlux(gas, steel float64) float64 {
	g, s := gas+273, steel+273
	return convection*(gas-steel) + emissivitySteel*emissivityFire*stefanBoltzmann*(g*g*g*g-s*s*s*s)
}

// TimeToReach returns the time, s, that unprotected steel of section factor
// AmV (1/m) and shadow factor ksh takes under the standard fire from 20 C to
// a temperature theta, and false where it is not reached in 8 hours.
// EN 1993-1-2:2005 4.2.5.1, (4.25), step by step.
func TimeToReach(theta, AmV, ksh float64) (float64, bool) {
	AmV = math.Max(AmV, leastSectionRate)
	steel := 20.0
	for t := 0.0; t < heatingLimit; t += heatingStep {
		// The flux of the end of the step heats the whole of it, which is on
		// the safe side by less than one step.
		flux := heatFlux(StandardFire(t+heatingStep), steel)
		rise := ksh * AmV / (SpecificHeat(steel) * design.Rho) * flux * heatingStep
		if steel+rise >= theta {
			return t + heatingStep*(theta-steel)/rise, true
		}
		steel += rise
	}
	return 0, false
}

// time fills the time to the critical temperature. Unprotected steel has no
// box: its heating follows the profile.
func (f *fireAssessment) time() {
	r := &f.result
	AmV := f.candidate.Section.SectionFactor(catalogue.Exposure{ThreeSides: f.member.Column.Fire.Sides == 3})
	seconds, ok := TimeToReach(r.CriticalTemperature, AmV, r.ShadowFactor)
	r.TimeToCritical = seconds / 60
	r.PeriodMet = r.Period > 0 && (!ok || r.TimeToCritical >= r.Period)
	switch {
	case !ok:
		f.note("unprotected, the critical temperature is not reached in 8 hours of the standard fire")
	case r.Period > 0 && !r.PeriodMet:
		f.note(fmt.Sprintf("unprotected, the critical temperature is reached after %.0f of %.0f minutes: protection is needed",
			math.Floor(r.TimeToCritical), r.Period))
	}
}
