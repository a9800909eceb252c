package verbs

import (
	"bufio"
	"errors"
	"fmt"
	"io/fs"
	"os"

	"enfilade/fileio/planfile"
	"enfilade/solver/plan"
)

// readable tells whether a plan can be read from a path, without reading it.
func readable(path string) error {
	f, err := open(path)
	if err != nil {
		return err
	}
	return f.Close()
}

// readPlan reads the plan file of that path.
func readPlan(path string) (*plan.Plan, error) {
	f, err := open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close() // reading only: nothing can be lost
	return planfile.Read(bufio.NewReader(f), path)
}

// open opens a file for reading and words what goes wrong.
func open(path string) (*os.File, error) {
	f, err := os.Open(path)
	if err != nil {
		return nil, fmt.Errorf("%s: file: %s", path, cause(err))
	}
	info, err := f.Stat()
	if err == nil && info.IsDir() {
		err = errFolder
	}
	if err != nil {
		f.Close()
		return nil, fmt.Errorf("%s: file: %s", path, cause(err))
	}
	return f, nil
}

var errFolder = errors.New("this is a folder; name a plan file in it")

// cause says why a file could not be opened, and what would help.
func cause(err error) string {
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return "there is no such file; name one that is there"
	case errors.Is(err, fs.ErrPermission):
		return "this account may not read it; change its permissions or name another"
	}
	var at *fs.PathError
	if errors.As(err, &at) {
		return at.Err.Error()
	}
	return err.Error()
}
