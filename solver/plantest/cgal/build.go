package cgal

import (
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"runtime"
	"strings"
	"sync"
)

// binary returns the path of the compiled reference program, compiling it unless these very sources were compiled before. Tests
// that start side by side compile it once.
var binary = sync.OnceValues(func() (string, error) {
	source, err := sourceFolder()
	if err != nil {
		return "", err
	}
	name, err := fingerprint(source)
	if err != nil {
		return "", err
	}
	cache, err := os.UserCacheDir()
	if err != nil {
		cache = os.TempDir()
	}
	folder := filepath.Join(cache, "enfilade", "cgal-"+name)
	path := filepath.Join(folder, "reference")
	if _, err := os.Stat(path); err == nil {
		return path, nil
	}
	if err := compile(source, folder); err != nil {
		return "", err
	}
	return path, nil
})

// compile builds into a folder of its own and renames it at the end, so that two tests may compile at once.
func compile(source, folder string) error {
	if err := prerequisites(); err != nil {
		return err
	}
	if err := os.MkdirAll(filepath.Dir(folder), 0o755); err != nil {
		return err
	}
	work, err := os.MkdirTemp(filepath.Dir(folder), "building-")
	if err != nil {
		return err
	}
	defer os.RemoveAll(work)
	cmd := exec.Command("make", "-j2", "-C", source, "OUT="+work)
	// Under a make that tests were started from, its flags and job server are not ours.
	cmd.Env = append(os.Environ(), "MAKEFLAGS=", "MFLAGS=", "MAKELEVEL=")
	if out, err := cmd.CombinedOutput(); err != nil {
		return fmt.Errorf("cgal: compiling testdata/cgal: %w\n%s", err, out)
	}
	if err := os.Rename(work, folder); err != nil {
		if _, there := os.Stat(filepath.Join(folder, "reference")); there != nil {
			return err
		}
	}
	return nil
}

// errMissing says what to install, in one line.
var errMissing = errors.New("cgal: CGAL's headers, g++ or make are missing: install them with " +
	"`apt-get install g++ make libcgal-dev` (make test does it), or run the tests with -short")

func prerequisites() error {
	if _, err := exec.LookPath("make"); err != nil {
		return errMissing
	}
	cmd := exec.Command("g++", "-E", "-x", "c++", "-")
	cmd.Stdin = strings.NewReader("#include <CGAL/Triangular_expansion_visibility_2.h>\n#include <gmp.h>\n")
	if err := cmd.Run(); err != nil {
		return errMissing
	}
	return nil
}

func sourceFolder() (string, error) {
	_, file, _, ok := runtime.Caller(0)
	if !ok {
		return "", errors.New("cgal: the source folder is not known")
	}
	folder := filepath.Join(filepath.Dir(file), "..", "..", "..", "testdata", "cgal")
	if _, err := os.Stat(folder); err != nil {
		return "", fmt.Errorf("cgal: %w", err)
	}
	return folder, nil
}

// fingerprint sums up the sources, the Makefile and the compiler.
func fingerprint(folder string) (string, error) {
	files, err := filepath.Glob(filepath.Join(folder, "*"))
	if err != nil {
		return "", err
	}
	sum := sha256.New()
	for _, f := range files { // Glob sorts
		ext := filepath.Ext(f)
		if ext != ".cpp" && ext != ".h" && filepath.Base(f) != "Makefile" {
			continue
		}
		text, err := os.ReadFile(f)
		if err != nil {
			return "", err
		}
		fmt.Fprintf(sum, "%s %d\n%s", filepath.Base(f), len(text), text)
	}
	if out, err := exec.Command("g++", "--version").Output(); err == nil {
		sum.Write(out)
	}
	return hex.EncodeToString(sum.Sum(nil))[:16], nil
}
