package working

import (
	"stanchion/catalogue"
)

// annexB writes the interaction factors of Annex B.
func (w *writer) annexB(bentY, bentZ bool) {
	x := &w.a.Interaction
	open := w.c.Section.Shape == catalogue.ShapeI
	plastic := x.Class <= 2
	if bentY {
		w.equivalent("y", x.PsiY, x.CmY, x.SwayY)
	}
	if bentZ {
		w.equivalent("z", x.PsiZ, x.CmZ, x.SwayZ)
	}
	if bentY && open {
		w.equivalent("LT", x.PsiLT, x.CmLT, false)
	}
	if bentY {
		source := "C_my (1 + 0.6 min(λ̄_y, 1) n_y)"
		if plastic {
			source = "C_my (1 + min(λ̄_y - 0.2, 0.8) n_y)"
		}
		w.find("k_yy", source, x.Kyy, None, "Table B.1")
	}
	if bentZ {
		w.annexBMinor(open, plastic)
	}
	if bentY {
		w.find("k_zy", annexBTwist(open, plastic, x.LambdaZ), x.Kzy, None, map[bool]string{true: "Table B.2", false: "Table B.1"}[open])
	}
}

func (w *writer) annexBMinor(open, plastic bool) {
	x := &w.a.Interaction
	source, share := "C_mz (1 + 0.6 min(λ̄_z, 1) n_z)", "k_zz"
	if plastic {
		source, share = "C_mz (1 + min(λ̄_z - 0.2, 0.8) n_z)", "0.6 k_zz"
		if open {
			source = "C_mz (1 + min(2 λ̄_z - 0.6, 1.4) n_z)"
		}
	}
	w.find("k_zz", source, x.Kzz, None, "Table B.1")
	w.find("k_yz", share, x.Kyz, None, "Table B.1")
}

// annexBTwist is k_zy: I and H are susceptible to torsional deformations,
// hollow sections are not.
func annexBTwist(open, plastic bool, lambdaZ float64) string {
	switch {
	case !open && plastic:
		return "0.6 k_yy"
	case !open:
		return "0.8 k_yy"
	case !plastic:
		return "1 - 0.05 min(λ̄_z, 1) n_z/(C_mLT - 0.25)"
	case lambdaZ < 0.4:
		return "min(0.6 + λ̄_z, 1 - 0.1 λ̄_z n_z/(C_mLT - 0.25))"
	}
	return "1 - 0.1 min(λ̄_z, 1) n_z/(C_mLT - 0.25)"
}
