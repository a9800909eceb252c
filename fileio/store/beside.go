package store

import (
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"
)

// Resolve returns the path of a file that another file names: relative paths begin in the folder of the file that names
// them, and are written with slashes.
func Resolve(owner, named string) string {
	named = filepath.FromSlash(named)
	if named == "" || filepath.IsAbs(named) {
		return named
	}
	return filepath.Join(filepath.Dir(owner), named)
}

// Relate is the inverse of [Resolve]: how owner names the file at path. It stays absolute where no relative path leads
// there.
func Relate(owner, path string) string {
	if path == "" {
		return ""
	}
	rel, err := filepath.Rel(filepath.Dir(owner), path)
	if err != nil {
		return path
	}
	return filepath.ToSlash(rel)
}

// Within reports whether the file at path lies in the folder of owner or in one below it.
func Within(owner, path string) bool {
	rel, err := filepath.Rel(filepath.Dir(owner), path)
	return err == nil && rel != ".." && !strings.HasPrefix(rel, ".."+string(filepath.Separator))
}

// CopyBeside copies the file at path into the folder of owner and returns where it lies then. A file of the same name is
// never replaced: one that holds the same is used, else the copy gets a number.
//
//   - Errors name the path and what could not be done.
func CopyBeside(owner, path string) (string, error) {
	print, data, err := PrintOf(path)
	if err != nil {
		return "", err
	}
	if !print.There() {
		return "", &os.PathError{Op: "open", Path: path, Err: os.ErrNotExist}
	}
	base := filepath.Base(path)
	ext := filepath.Ext(base)
	to := filepath.Join(filepath.Dir(owner), base)
	for n := 2; ; n++ {
		there, _, err := PrintOf(to)
		if err == nil && there.Same(print) {
			return to, nil
		}
		if err == nil && !there.There() {
			break
		}
		to = filepath.Join(filepath.Dir(owner), strings.TrimSuffix(base, ext)+"-"+strconv.Itoa(n)+ext)
	}
	return to, Save(to, func(w io.Writer) error { _, err := w.Write(data); return err })
}

// Ends reports whether reading the file at path comes to an end: devices and pipes may go on for ever, and a plan that came from
// elsewhere may name one as its picture. What is not there ends.
func Ends(path string) bool {
	info, err := os.Stat(path)
	return err != nil || info.Mode().IsRegular() || info.IsDir()
}
