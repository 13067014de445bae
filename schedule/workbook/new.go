package workbook

import (
	"bufio"
	"io"
	"slices"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule/workbook/internal/markup"
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
	return finished(w, data, own)
}

// finished writes a workbook with the mark of the program and the rows in it.
func finished(w io.Writer, data []byte, own *own) error {
	b, err := OpenBytes("", data)
	if err != nil {
		return err
	}
	defer b.Close()
	at := b.root.From
	out := opc.NewRewrite(b.pkg)
	out.Set(b.main, slices.Concat(b.doc[:at:at], []byte(mark), b.doc[at:]))
	style := func(l Look) int { return own.looks[l] }
	for _, s := range b.sheets {
		if own.sheets[s.name] == nil {
			continue
		}
		out.SetStream(s.part, func(to io.Writer) error { return b.fill(s, own.filling(s.name, style), to, nil) })
	}
	return out.Write(w)
}

// fill copies a sheet with its rows put in.
func (b *Book) fill(s *sheet, f *filling, to io.Writer, retag func(*markup.Token) string) error {
	in, err := b.pkg.Stream(s.part)
	if err != nil {
		return err
	}
	defer in.Close()
	out := bufio.NewWriterSize(to, 1<<16)
	if err := f.copy(in, out, retag); err != nil {
		return err
	}
	return out.Flush()
}
