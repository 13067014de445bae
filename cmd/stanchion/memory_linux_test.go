package main

import (
	"bytes"
	"fmt"
	"os"
)

// peakMemory returns the most memory, in kB, that a running process has held
// so far; 0 once it has ended. The usage that the system gives of an ended
// child counts what its parent held when it started it.
func peakMemory(pid int) (kB int64) {
	status, err := os.ReadFile(fmt.Sprintf("/proc/%d/status", pid))
	if err != nil {
		return 0
	}
	if _, after, ok := bytes.Cut(status, []byte("VmHWM:")); ok {
		fmt.Sscan(string(after), &kB)
	}
	return kB
}
