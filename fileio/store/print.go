package store

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"io"
	"io/fs"
	"os"
	"time"
)

// Print tells one state of a file from another: by its size, when it was last changed, and what it holds. The zero Print is
// that of a file that is not there.
type Print struct {
	Size int64
	Time time.Time // when it was changed last
	Sum  string    // SHA-256 of what it holds, as hexadecimal digits
}

// There reports whether there was a file.
func (p Print) There() bool { return p.Sum != "" }

// Same reports whether both are prints of the same bytes, whenever they were written.
func (p Print) Same(q Print) bool { return p.Size == q.Size && p.Sum == q.Sum }

// PrintOf reads the file at path and returns its print, and what it holds. A file that is not there is no error.
//
//   - Errors: what the system says of a file that cannot be read.
func PrintOf(path string) (Print, []byte, error) {
	f, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		return Print{}, nil, nil
	}
	if err != nil {
		return Print{}, nil, err
	}
	defer f.Close() // it is only read
	data, err := io.ReadAll(f)
	if err != nil {
		return Print{}, nil, err
	}
	info, err := f.Stat()
	if err != nil {
		return Print{}, nil, err
	}
	return printOf(data, info.ModTime()), data, nil
}

// Written returns the print of the file at path that data was just written to, without reading it.
func Written(path string, data []byte) Print {
	var at time.Time
	if info, err := os.Stat(path); err == nil {
		at = info.ModTime()
	}
	return printOf(data, at)
}

func printOf(data []byte, at time.Time) Print {
	sum := sha256.Sum256(data)
	return Print{Size: int64(len(data)), Time: at, Sum: hex.EncodeToString(sum[:])}
}

// Changed reports whether the file at path holds something else than it did at the print, and its print of now. A file
// that is gone has not changed: nothing would be lost by writing it anew. Size and time are looked at first; with sure, the
// bytes are compared even when both are as they were.
//
//   - Errors: what the system says of a file that cannot be read.
func (p Print) Changed(path string, sure bool) (bool, Print, error) {
	info, err := os.Stat(path)
	if errors.Is(err, fs.ErrNotExist) {
		return false, p, nil
	}
	if err != nil {
		return false, p, err
	}
	if !sure && p.There() && info.Size() == p.Size && info.ModTime().Equal(p.Time) {
		return false, p, nil
	}
	now, _, err := PrintOf(path)
	if err != nil || !now.There() {
		return false, p, err
	}
	return !now.Same(p), now, nil
}
