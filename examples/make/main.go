// Command make writes the example schedules: Ottermere Depot, an invented
// five-storey bus depot, as a workbook such as a design office keeps and as
// plain text, and the revised issue of it with the sections that were ordered.
//
//	go run ./examples/make examples
package main

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
)

func main() {
	if len(os.Args) != 2 {
		fmt.Fprintln(os.Stderr, "usage: make FOLDER")
		os.Exit(2)
	}
	if err := writeAll(os.Args[1]); err != nil {
		fmt.Fprintln(os.Stderr, "make:", err)
		os.Exit(1)
	}
}

func writeAll(dir string) error {
	files, err := contents()
	if err != nil {
		return err
	}
	for name, data := range files {
		if err := os.WriteFile(filepath.Join(dir, name), data, 0o666); err != nil {
			return err
		}
	}
	return nil
}

// contents returns every file of the example by its name.
func contents() (map[string][]byte, error) {
	first, second := issue(firstIssue), issue(secondIssue)
	book, err := workbook(first)
	if err != nil {
		return nil, err
	}
	var buf bytes.Buffer
	if _, err := book.WriteTo(&buf); err != nil {
		return nil, err
	}
	return map[string][]byte{
		"ottermere-depot.xlsx":        buf.Bytes(),
		"ottermere-depot.csv":         csvOf(first),
		"ottermere-depot-ordered.csv": csvOf(second),
	}, nil
}
