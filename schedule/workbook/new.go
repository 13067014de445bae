package workbook

import (
	"io"
	"slices"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule/workbook/internal/opc"
)

// WriteNew writes a workbook of these sheets alone. The same sheets give the
// same bytes.
func WriteNew(w io.Writer, sheets []Sheet) error {
	own := newOwn(usualLettering)
	taken := map[string]bool{}
	for i := range sheets {
		name := cutName(sheets[i].Name, "")
		if taken[name] {
			panic("workbook: two sheets named " + name)
		}
		taken[name] = true
		if err := own.add(&sheets[i], name, i == 0); err != nil {
			return err
		}
	}
	// The library would name its author.
	err := own.file.SetDocProps(&excelize.DocProperties{Creator: "stanchion", LastModifiedBy: "stanchion"})
	if err != nil {
		return err
	}
	data, err := own.bytes()
	if err != nil {
		return err
	}
	return finished(w, data, own.links)
}

// finished writes a workbook with the mark of the program and the links in it.
func finished(w io.Writer, data []byte, links map[string][]link) error {
	b, err := OpenBytes("", data)
	if err != nil {
		return err
	}
	defer b.Close()
	at := b.root.From
	out := opc.NewRewrite(b.pkg)
	out.Set(b.main, slices.Concat(b.doc[:at:at], []byte(mark), b.doc[at:]))
	for _, s := range b.sheets {
		if list := links[s.name]; len(list) > 0 {
			out.SetStream(s.part, func(to io.Writer) error { return b.link(s, list, to) })
		}
	}
	return out.Write(w)
}
