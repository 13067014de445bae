package text

import (
	"bytes"
	"io"
	"strings"
	"testing"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule"
)

// FuzzFile reads and annotates arbitrary bytes: an error, or an output that
// holds every record of the user's, and never a panic.
func FuzzFile(f *testing.F) {
	for _, s := range []string{
		"Mark,Length,N_Ed\nC1,3.6,1200\n", "Mark;Length;N_Ed\r\nC1;3,6;1200\r\n", "\ufeffMark\tLength\tN_Ed\nC1\t3.6\t\"12\n00\"\n",
		"sep=;\nMark;Length;N_Ed\nC1;3,6;1200", "\xff\xfeM\x00a\x00", "Mark,Length,N_Ed\nC1,3.6,\"open", "Mark,Combination,Length,N_Ed\nC1,A,3.6,1\nC1,B,3.6,2\nC1,A,4,5\n",
		"Mark,Length,N_Ed,Result: section\nC1,3.6,1200,x\n", "Mark,Length,N_Ed\rC1,3.6,1200\r", "M\x84rk;L\xe4nge;N_Ed\n\xe9;3;5\n",
	} {
		f.Add([]byte(s))
	}
	f.Fuzz(func(t *testing.T, data []byte) {
		if len(data) > 1<<14 {
			return
		}
		src, err := OpenReader(bytes.NewReader(data), "loads.csv")
		if err != nil {
			return
		}
		defer src.Close()
		plan, err := schedule.Scan(src, schedule.Options{National: ec3.NationalSet})
		if err != nil {
			return
		}
		var out bytes.Buffer
		w, err := src.NewWriter(&out, plan, schedule.ResultColumns(schedule.ResultOptions{}))
		if err != nil {
			t.Fatal(err)
		}
		for m, err := range plan.Members() {
			if err != nil {
				t.Fatal(err)
			}
			if err := w.Write(m, &design.Result{Section: "203x203x46 UKC", Grade: "S355"}); err != nil {
				t.Fatal(err)
			}
		}
		if err := w.Close(); err != nil {
			t.Fatal(err)
		}
		if src.form.enc == nil && len(plan.Header.Old) == 0 {
			holdsRecords(t, src, out.String())
		}
	})
}

// holdsRecords checks that every record of the input opens a stretch of the
// output, in order.
func holdsRecords(t *testing.T, src *File, out string) {
	records := src.records()
	for {
		rec, err := records.next()
		if err == io.EOF {
			return
		}
		if err != nil {
			t.Fatal(err)
		}
		i := strings.Index(out, string(rec.raw))
		if i < 0 {
			t.Fatalf("%q is lost", rec.raw)
		}
		out = out[i+len(rec.raw):]
	}
}
