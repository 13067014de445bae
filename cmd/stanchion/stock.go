package main

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"stanchion/catalogue"
)

// readStock reads the list of sections that may be used.
func readStock(path string) (*catalogue.Catalogue, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, fmt.Errorf("stock list %s: %w", path, plainCause(err))
	}
	defer f.Close()
	return catalogue.Default().Stock(f, path)
}

// plainCause drops the system call and the path from an error of the disk.
func plainCause(err error) error {
	var path *fs.PathError
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return errors.New("no such file: check the name and the folder")
	case errors.As(err, &path):
		return path.Err
	}
	return err
}

// findFile returns a file that a setting names: as it stands, or else beside
// the schedule that names it.
func findFile(name, schedule string) string {
	if filepath.IsAbs(name) || schedule == stdio {
		return name
	}
	if _, err := os.Stat(name); err == nil {
		return name
	}
	if other := filepath.Join(filepath.Dir(schedule), name); other != name {
		if _, err := os.Stat(other); err == nil {
			return other
		}
	}
	return name
}
