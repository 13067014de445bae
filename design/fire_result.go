package design

// FireResult is what is said about one column in fire (EN 1993-1-2:2005). Its
// zero value says that nothing was asked for.
type FireResult struct {
	Asked     bool
	LoadRatio float64 // eta_fi: action in fire over the ambient one
	Period    float64 // required, minutes; 0: none

	CriticalTemperature float64 // C; 0: none, and Reason says why
	Reason              string  // why there is no critical temperature
	Notes               []string

	Governing Check // at the critical temperature: Ed in fire, Rd at 20 C, clause of EN 1993-1-2
	Class     int   // in fire (4.2.2)

	// The values behind a resistance to buckling at the critical temperature;
	// zero where class 4 or tension decides.
	Lcr         float64 // mm
	How         string  // how Lcr was found, for people
	LambdaBar   float64 // at 20 C, gross section
	LambdaTheta float64 // at the critical temperature
	Ky, KE      float64 // Table 3.1
	Chi         float64 // chi_fi

	SectionFactor  float64 // A_m/V as exposed, 1/m
	ShadowFactor   float64 // k_sh
	TimeToCritical float64 // minutes, unprotected under the standard fire; 0: none
	PeriodMet      bool    // unprotected, the required period is met
}
