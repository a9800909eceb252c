package store

import (
	"bufio"
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math/rand/v2"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"sync"
	"time"
)

// Shelter is a folder in which running programs keep copies of work that no file holds yet, each program's own beside those
// of the others. A program holds a lock there for as long as it runs, which the system takes away when it ends, however
// it ends; so what a program left behind is told from what a running one keeps. Its methods may be called from any goroutine.
type Shelter struct {
	folder string
	name   string // begins the names of this program's files
	mu     sync.Mutex
	locks  map[string]*os.File // by name: its own, and those of ended programs whose copies it has taken charge of
}

// Note says what a copy is of.
type Note struct {
	Path  string    // of the file the work belongs to; empty when it has none yet
	Title string    // what people call the work
	At    time.Time // when the copy was made
	PID   int       // of the program that made it
	Print Print     // of the file when it was last read or written
}

// Left is a copy that an ended program left behind.
type Left struct {
	Note
	file string
}

// The names in a shelter: NAME.lock is a running program's, NAME-N.kept are its copies.
const (
	lockSuffix = ".lock"
	keptSuffix = ".kept"
)

// OpenShelter makes the folder where it is missing and enters it.
//
//   - Errors name the folder and what could not be done.
func OpenShelter(folder string) (*Shelter, error) {
	if err := os.MkdirAll(folder, 0o700); err != nil {
		return nil, fmt.Errorf("%s: cannot keep unsaved work: %w", folder, bare(err))
	}
	for try := 0; ; try++ {
		name := strconv.Itoa(os.Getpid()) + "-" + strconv.FormatUint(rand.Uint64(), 36)
		lock, ok, err := takeLock(filepath.Join(folder, name+lockSuffix))
		switch {
		case err == nil && ok:
			return &Shelter{folder: folder, name: name, locks: map[string]*os.File{name: lock}}, nil
		case err == nil && try < 10: // another program swept it away just now
			continue
		case err == nil:
			err = errors.New("its lock is taken away again and again")
		}
		return nil, fmt.Errorf("%s: cannot keep unsaved work: %w", folder, bare(err))
	}
}

func (s *Shelter) kept(n int) string {
	return filepath.Join(s.folder, s.name+"-"+strconv.Itoa(n)+keptSuffix)
}

// Keep replaces this program's copy number n by what write writes. The process id of the note is filled in.
//
//   - Errors name the file and what could not be done; the copy before is then untouched.
func (s *Shelter) Keep(n int, note Note, write func(io.Writer) error) error {
	note.PID = os.Getpid()
	head, err := json.Marshal(note)
	if err != nil {
		return err
	}
	return Save(s.kept(n), func(w io.Writer) error {
		if _, err := w.Write(append(head, '\n')); err != nil {
			return err
		}
		return write(w)
	})
}

// Drop takes this program's copy number n away, if there is one.
func (s *Shelter) Drop(n int) error {
	if err := os.Remove(s.kept(n)); err != nil && !errors.Is(err, os.ErrNotExist) {
		return err
	}
	return nil
}

// Left returns the copies of programs that have ended, newest first, and takes charge of them: another program that asks
// is not told of them while this one runs.
func (s *Shelter) Left() []Left {
	s.mu.Lock()
	defer s.mu.Unlock()
	names, err := filepath.Glob(filepath.Join(s.folder, "*"+keptSuffix))
	if err != nil {
		return nil
	}
	slices.Sort(names)
	var left []Left
	for _, file := range names {
		base := strings.TrimSuffix(filepath.Base(file), keptSuffix)
		owner := base[:max(strings.LastIndexByte(base, '-'), 0)]
		if owner == s.name || !s.inherit(owner) {
			continue
		}
		if note, err := readNote(file); err == nil {
			left = append(left, Left{note, file})
		}
	}
	slices.SortStableFunc(left, func(a, b Left) int { return b.At.Compare(a.At) })
	s.sweep()
	return left
}

// inherit takes the lock of an ended program, unless it is held already. It fails when that program still runs, or another
// one was quicker.
func (s *Shelter) inherit(owner string) bool {
	if s.locks[owner] != nil {
		return true
	}
	lock, ok, err := takeLock(filepath.Join(s.folder, owner+lockSuffix))
	if err != nil || !ok {
		return false
	}
	s.locks[owner] = lock
	return true
}

// sweep takes away the locks of ended programs that left nothing behind.
func (s *Shelter) sweep() {
	names, err := filepath.Glob(filepath.Join(s.folder, "*"+lockSuffix))
	if err != nil {
		return
	}
	for _, file := range names {
		if s.locks[strings.TrimSuffix(filepath.Base(file), lockSuffix)] != nil {
			continue
		}
		if lock, ok, err := takeLock(file); err == nil && ok {
			os.Remove(file)
			lock.Close()
		}
	}
}

// Close takes this program's lock away. Its copies stay: whoever wants them gone drops them first.
func (s *Shelter) Close() {
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, lock := range s.locks {
		os.Remove(lock.Name())
		lock.Close()
	}
	s.locks = nil
}

func readNote(file string) (Note, error) {
	var note Note
	f, err := os.Open(file)
	if err != nil {
		return note, err
	}
	defer f.Close() // it is only read
	head, err := bufio.NewReader(f).ReadBytes('\n')
	if err != nil {
		return note, err
	}
	return note, json.Unmarshal(head, &note)
}

// Read returns what the copy holds.
func (l Left) Read() ([]byte, error) {
	data, err := os.ReadFile(l.file)
	if err != nil {
		return nil, err
	}
	_, body, ok := bytes.Cut(data, []byte{'\n'})
	if !ok {
		return nil, fmt.Errorf("%s: is no copy of unsaved work", l.file)
	}
	return body, nil
}

// File returns where the copy lies.
func (l Left) File() string { return l.file }

// Discard takes the copy away.
func (l Left) Discard() error { return os.Remove(l.file) }
