//go:build !windows

package outfile

import (
	"errors"
	"os"
	"syscall"
)

func isFull(err error) bool {
	return errors.Is(err, syscall.ENOSPC) || errors.Is(err, syscall.EDQUOT)
}

func isHeld(err error) bool { return errors.Is(err, syscall.ETXTBSY) }

// syncFolder makes the renaming last through a power cut. Not every file
// system can; the file itself is safe by then.
func syncFolder(dir string) {
	if d, err := os.Open(dir); err == nil {
		_ = d.Sync()
		d.Close()
	}
}
