package store

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strconv"
	"syscall"
)

// maxLinks bounds a chain of symbolic links, as the system does.
const maxLinks = 40

// Save replaces the file at path by what write writes.
//
//   - A symbolic link stays, and the file it leads to is replaced. An existing file keeps its permissions, and its owner where
//     the system lets it; a new one gets what the umask leaves of 0666.
//   - Errors name the path and what could not be done, and wrap the cause; an error of write is wrapped too. The old file is
//     then untouched and nothing is left beside it. A file that may not be written is not replaced either.
func Save(path string, write func(io.Writer) error) error {
	target, err := follow(path)
	if err != nil {
		return fmt.Errorf("%s: cannot be saved: %w", path, err)
	}
	old, err := writable(target)
	if err != nil {
		return fmt.Errorf("%s: cannot be saved: %w", path, err)
	}
	temp, err := create(target)
	if err != nil {
		return fmt.Errorf("%s: cannot be saved: no new file can be made in its folder: %w", path, bare(err))
	}
	name := temp.Name()
	defer func() {
		if name != "" { // it was not renamed: something failed, or write panicked
			temp.Close()
			os.Remove(name)
		}
	}()
	if err := write(temp); err != nil {
		return fmt.Errorf("%s: cannot be saved: %w", path, err)
	}
	if err := settle(temp, old); err != nil {
		return fmt.Errorf("%s: cannot be saved: the new text does not reach the disk: %w", path, bare(err))
	}
	if err := os.Rename(name, target); err != nil {
		return fmt.Errorf("%s: cannot be saved: the old file cannot be replaced: %w", path, bare(err))
	}
	name = ""
	if err := syncFolder(filepath.Dir(target)); err != nil {
		return fmt.Errorf("%s: saved, but its folder does not reach the disk: %w", path, bare(err))
	}
	return nil
}

// follow returns where a path leads when its last part is a symbolic link, also one to a file that is not there yet.
func follow(path string) (string, error) {
	for range maxLinks {
		info, err := os.Lstat(path)
		if err != nil || info.Mode()&fs.ModeSymlink == 0 {
			return path, nil // what else is wrong with it shows when it is written
		}
		to, err := os.Readlink(path)
		if err != nil {
			return "", bare(err)
		}
		if !filepath.IsAbs(to) {
			to = filepath.Join(filepath.Dir(path), to)
		}
		path = to
	}
	return "", errors.New("its symbolic links lead round in a circle")
}

// writable returns what is known of the file to be replaced, nil when there is none, and an error when it may not be.
func writable(target string) (fs.FileInfo, error) {
	info, err := os.Stat(target)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, nil
	case err != nil:
		return nil, bare(err)
	case info.IsDir():
		return nil, errors.New("it is a folder")
	case !info.Mode().IsRegular():
		return nil, errors.New("it is no ordinary file")
	}
	f, err := os.OpenFile(target, os.O_WRONLY, 0)
	if err != nil {
		return nil, bare(err)
	}
	return info, f.Close()
}

// create makes a new file beside the target. os.CreateTemp would not do: it takes from a new file what the umask grants.
func create(target string) (*os.File, error) {
	folder, base := filepath.Split(target)
	for try := 0; ; try++ {
		name := folder + "." + base + "." + strconv.FormatUint(rand.Uint64(), 36) + ".tmp"
		f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
		if !errors.Is(err, fs.ErrExist) || try >= 100 {
			return f, err
		}
	}
}

// settle gives a file the permissions of the old one, if any, forces it to disk and closes it.
func settle(f *os.File, old fs.FileInfo) error {
	if old != nil {
		keepOwner(f, old) // first: a change of owner may take permissions away
		if err := f.Chmod(old.Mode().Perm()); err != nil {
			return err
		}
	}
	if err := f.Sync(); err != nil {
		return err
	}
	return f.Close()
}

// syncFolder forces a folder's entries to disk, where the file system has a notion of that.
func syncFolder(folder string) error {
	f, err := os.Open(folder)
	if err != nil {
		return err
	}
	defer f.Close()
	if err := f.Sync(); err != nil && !errors.Is(err, syscall.EINVAL) && !errors.Is(err, errors.ErrUnsupported) {
		return err
	}
	return nil
}

// bare takes the path off an error that is about to be told with one.
func bare(err error) error {
	var path *fs.PathError
	var link *os.LinkError
	switch {
	case errors.As(err, &path):
		return path.Err
	case errors.As(err, &link):
		return link.Err
	}
	return err
}
