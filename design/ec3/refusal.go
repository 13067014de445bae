package ec3

import "stanchion/design/material"

// Refusal says that a rule does not cover a candidate, so that no number may
// be given for it.
type Refusal struct {
	Clause string // "Table 6.2"
	Reason string // for people, without the section's name
}

func (r *Refusal) Error() string { return r.Reason + " (" + r.Clause + ")" }

// strengthRefusal turns the error of material into a refusal.
func strengthRefusal(err error) *Refusal {
	if scope, ok := err.(*material.ScopeError); ok {
		return &Refusal{"3.2.1", scope.Reason}
	}
	return &Refusal{"3.2.1", err.Error()}
}
