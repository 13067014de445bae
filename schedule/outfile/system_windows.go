package outfile

import (
	"errors"
	"syscall"
)

// Windows error codes that package syscall does not name.
const (
	errorSharingViolation = syscall.Errno(32)
	errorHandleDiskFull   = syscall.Errno(39)
	errorDiskFull         = syscall.Errno(112)
)

func isFull(err error) bool {
	return errors.Is(err, errorDiskFull) || errors.Is(err, errorHandleDiskFull)
}

func isHeld(err error) bool { return errors.Is(err, errorSharingViolation) }

// syncFolder does nothing: Windows has no handle to sync a folder by.
func syncFolder(string) {}
