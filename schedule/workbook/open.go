package workbook

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"unicode/utf16"

	"github.com/richardlehane/mscfb"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// Extensions are those of the files that this package reads and writes.
func Extensions() []string { return []string{".xlsx", ".xlsm", ".xltx", ".xltm"} }

// Is reports whether a file is named or begins like a workbook of any kind,
// and so is to be opened here and not as text: it may still be one that cannot
// be read.
func Is(path string) bool {
	switch strings.ToLower(filepath.Ext(path)) {
	case ".xlsx", ".xlsm", ".xltx", ".xltm", ".xls", ".xlsb", ".xlam", ".ods":
		return true
	}
	f, err := os.Open(path)
	if err != nil {
		return false
	}
	defer f.Close()
	head := make([]byte, 8)
	n, _ := io.ReadFull(f, head)
	return isZip(head[:n]) || isCompound(head[:n])
}

// Open opens a workbook for reading. Its errors are of type
// *schedule.Refusal, or come from the disk.
func Open(path string) (b *Book, err error) {
	defer func() {
		if r := recover(); r != nil {
			b, err = nil, damaged(path, fmt.Errorf("%v", r))
		}
	}()
	info, err := os.Stat(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, refuse(path, "no such file", "check the name and the folder")
	case err != nil:
		return nil, refuse(path, "cannot be read", plainCause(err))
	case info.IsDir():
		return nil, refuse(path, "is a folder", "name the workbook in it")
	}
	f, err := os.Open(path)
	if err != nil {
		return nil, refuse(path, "cannot be read", plainCause(err))
	}
	b, err = openFile(path, f, info.Size())
	if err != nil {
		f.Close()
		return nil, err
	}
	b.file = f
	return b, nil
}

// OpenBytes opens a workbook that is held in memory; name is for messages.
func OpenBytes(name string, data []byte) (b *Book, err error) {
	defer func() {
		if r := recover(); r != nil {
			b, err = nil, damaged(name, fmt.Errorf("%v", r))
		}
	}()
	return openFile(name, bytes.NewReader(data), int64(len(data)))
}

func openFile(name string, r io.ReaderAt, size int64) (*Book, error) {
	if err := recognise(name, r, size); err != nil {
		return nil, err
	}
	pkg, err := opc.Open(r, size)
	if err != nil {
		return nil, explain(name, err)
	}
	if err := recogniseParts(name, pkg); err != nil {
		return nil, err
	}
	b := &Book{name: name, data: r, size: size, pkg: pkg}
	if err := b.load(); err != nil {
		return nil, explain(name, err)
	}
	return b, nil
}

func isZip(head []byte) bool {
	return bytes.HasPrefix(head, []byte("PK\x03\x04")) || bytes.HasPrefix(head, []byte("PK\x05\x06"))
}

// isCompound recognises the older container of Office files.
func isCompound(head []byte) bool {
	return bytes.HasPrefix(head, []byte{0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1})
}

// recognise refuses what is not a zip archive, saying what it is.
func recognise(name string, r io.ReaderAt, size int64) error {
	head := make([]byte, 8)
	n, err := r.ReadAt(head, 0)
	if err != nil && err != io.EOF {
		return refuse(name, "cannot be read", plainCause(err))
	}
	head = head[:n]
	switch {
	case size == 0:
		return refuse(name, "is empty", "give a workbook that holds a schedule")
	case isZip(head):
		return nil
	case isCompound(head):
		return recogniseCompound(name, r, size)
	}
	return refuse(name, "is not an .xlsx or .xlsm workbook", "save it as .xlsx, or give a delimited text file named .csv or .txt")
}

func recogniseCompound(name string, r io.ReaderAt, size int64) error {
	if holdsEncrypted(r, size) {
		return refuse(name, "is protected with a password", "open it, take the password off and save it, then run this again")
	}
	return refuse(name, "is in the old .xls format or another that is not .xlsx", "open it and save it as .xlsx")
}

// holdsEncrypted looks for the stream that an encrypted workbook has.
func holdsEncrypted(r io.ReaderAt, size int64) (found bool) {
	const stream = "EncryptedPackage"
	defer func() {
		if recover() != nil {
			found = false
		}
	}()
	doc, err := mscfb.New(io.NewSectionReader(r, 0, size))
	if err != nil {
		// Its directory cannot be followed: look for the name in the file.
		head := make([]byte, min(size, 1<<20))
		r.ReadAt(head, 0)
		return bytes.Contains(head, utf16Bytes(stream))
	}
	for e, err := doc.Next(); err == nil; e, err = doc.Next() {
		if e.Name == stream {
			return true
		}
	}
	return false
}

func utf16Bytes(s string) []byte {
	var out []byte
	for _, u := range utf16.Encode([]rune(s)) {
		out = append(out, byte(u), byte(u>>8))
	}
	return out
}

// recogniseParts refuses archives that are not workbooks, saying what they
// are.
func recogniseParts(name string, pkg *opc.Package) error {
	switch {
	case pkg.Has("xl/workbook.bin"):
		return refuse(name, "is a binary .xlsb workbook", "open it and save it as .xlsx")
	case pkg.Has("content.xml") && pkg.Has("mimetype"):
		return refuse(name, "is an OpenDocument file", "open it and save it as .xlsx")
	case pkg.Has("word/document.xml") || pkg.Has("ppt/presentation.xml"):
		return refuse(name, "is a document without sheets", "give the workbook that holds the schedule")
	case !pkg.Has(opc.ContentTypes):
		return refuse(name, "is an archive and not a workbook", "give the workbook that holds the schedule")
	}
	return nil
}

// refuse returns the error that stops a run.
func refuse(file, what, do string) error {
	return &schedule.Refusal{Problem: schedule.Problem{File: file, What: what, Do: do, Col: -1}}
}

// explain puts an error from the depths of the file in a person's words.
func explain(file string, err error) error {
	var size *opc.SizeError
	var refusal *schedule.Refusal
	switch {
	case err == nil || errors.As(err, &refusal):
		return err
	case errors.As(err, &size):
		return refuse(file, size.Error()+", far more than a schedule needs", "save it again in a spreadsheet program, or clear what is not used")
	case errors.Is(err, markup.ErrSyntax), errors.Is(err, opc.ErrDamaged):
		return damaged(file, err)
	}
	return refuse(file, "cannot be read", plainCause(err))
}

func damaged(file string, err error) error {
	return refuse(file, fmt.Sprintf("is damaged (%v)", err), "open it in a spreadsheet program, let it be repaired and save it")
}

// plainCause drops the system call and path from an error of the disk.
func plainCause(err error) string {
	var path *fs.PathError
	if errors.As(err, &path) {
		return path.Err.Error()
	}
	return err.Error()
}
