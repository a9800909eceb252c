//go:build !unix

package store

import (
	"os"
	"path/filepath"
	"strconv"
	"strings"
)

// takeLock opens the lock file at path. Where there are no locks that end with their program, the process number in its name
// tells whether the program still runs; ok is false when it does.
func takeLock(path string) (f *os.File, ok bool, err error) {
	number, _, _ := strings.Cut(filepath.Base(path), "-")
	if pid, err := strconv.Atoi(number); err == nil && pid != os.Getpid() {
		if p, err := os.FindProcess(pid); err == nil {
			p.Release()
			return nil, false, nil
		}
	}
	f, err = os.OpenFile(path, os.O_RDWR|os.O_CREATE, 0o600)
	return f, err == nil, err
}
