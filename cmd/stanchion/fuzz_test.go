package main

import (
	"bytes"
	"context"
	"math"
	"os"
	"path/filepath"
	"testing"
)

// Whatever is typed as a range is one, or an error.
func FuzzSpan(f *testing.F) {
	for _, s := range []string{"", "200..260", "..260", "200..", "10", "ten", "..", "1e3..", "-0..1", "0x10..", "NaN..Inf"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s, err := parseSpan(text)
		if err != nil {
			return
		}
		if math.IsNaN(s.least) || math.IsNaN(s.most) || s.least < 0 || s.most != 0 && s.least > s.most {
			t.Errorf("%q is read as %v", text, s)
		}
	})
}

// Whatever a file given as a national set holds, its factors stay factors, or
// it is refused.
func FuzzNational(f *testing.F) {
	for _, s := range []string{"", "base,UK\ngamma_M1,1.1,ours", "name,value\nstrength,table31", "gamma_M0,NaN", "\"", "base", "gamma_M0,1\nbase,DE", "\ufeffbase;UK"} {
		f.Add([]byte(s))
	}
	dir := f.TempDir()
	f.Fuzz(func(t *testing.T, data []byte) {
		path := filepath.Join(dir, "ours.csv")
		if err := os.WriteFile(path, data, 0o666); err != nil {
			t.Fatal(err)
		}
		n, err := readNational(path)
		if err != nil {
			return
		}
		for _, x := range []float64{n.GammaM0, n.GammaM1, n.GammaMfi} {
			if !(x >= 0.5 && x <= 3) {
				t.Errorf("a partial factor of %v", x)
			}
		}
	})
}

// Whatever stands in a text schedule, the run ends with one of its statuses.
func FuzzSizeText(f *testing.F) {
	for _, s := range []string{"", "Mark,Length,N_Ed\nA,4,500\n", "Mark;Length;N_Ed\nA;3,5;1.200,5\n", "a,b\n1,2\n", "Mark,Length,N_Ed,Section,Restraints z-z\nA,4,tbc,HE,9\n",
		"Length,N_Ed,Group,Ends y-y\n4,500,G,fixed-free\n4,1,G,\n", "Length\tN_Ed\tM_y,Ed top\n6\t-20\t15\n"} {
		f.Add([]byte(s))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		if len(data) > 10_000 {
			return
		}
		var said bytes.Buffer
		con := &console{in: bytes.NewReader(data), out: &said, err: &said}
		switch status := execute(context.Background(), con, []string{"size", "-", "--workers", "1"}); status {
		case statusPasses, statusFails, statusNotRead, statusNothing:
		default:
			t.Errorf("status %d: %s", status, said.String())
		}
		if bytes.Contains(said.Bytes(), []byte("defect of this program")) {
			t.Error(said.String())
		}
	})
}
