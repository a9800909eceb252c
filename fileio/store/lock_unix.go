//go:build unix

package store

import (
	"errors"
	"os"
	"syscall"
)

// takeLock opens the lock file at path, making it where it is missing, and takes its lock; ok is false when another program
// holds it. The system gives the lock back when the file is closed, also by the program's end.
func takeLock(path string) (f *os.File, ok bool, err error) {
	f, err = os.OpenFile(path, os.O_RDWR|os.O_CREATE, 0o600)
	if err != nil {
		return nil, false, err
	}
	if err = syscall.Flock(int(f.Fd()), syscall.LOCK_EX|syscall.LOCK_NB); err == nil && named(f, path) {
		return f, true, nil
	}
	f.Close()
	if errors.Is(err, syscall.EWOULDBLOCK) {
		err = nil
	}
	return nil, false, err
}

// named reports whether f still is the file at path: between opening and locking it another program may have swept it away.
func named(f *os.File, path string) bool {
	mine, err1 := f.Stat()
	there, err2 := os.Stat(path)
	return err1 == nil && err2 == nil && os.SameFile(mine, there)
}
