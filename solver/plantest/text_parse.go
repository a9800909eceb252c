package plantest

import (
	"fmt"
	"strconv"
	"strings"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// Parse reads a plan from its text notation and fails the test when it cannot.
//
// Statements end at a semicolon or a line's end; # starts a comment. Lengths and places are metres with at most four
// decimals (the grid), angles are degrees. A statement is a word, then points "x,y", settings "key=value" and flags:
//
//	wall 0,0 8,0 th=0.2 just=left h=2.4     glass, screen and low are walls of the other kinds; low needs h=
//	door W1 seg=0 at=1.2 w=0.9 leaf=solid shut hinge=end side=right
//	floor 0,0 8,0 8,5 0,5                   block 1,1 2,1 2,2 h=1.1        zone name=Hall 0,0 1,0 1,1 room
//	observer 2,2 eye=1.6 heading=0 view=60 range=5
//	target 3,3      target 3,3 4,3 (a face)     start 1,1     walker radius=0.3 pace=1.2 eye=1.6
//	route from=S1 2,1 3,2 to=T1 (its waypoints)
//
// Items are numbered from 1 in their list as W1, D1, B1, Z1, O1, T1, S1, R1, unless id= names them.
func Parse(t testing.TB, text string) *plan.Plan {
	t.Helper()
	p, err := Read(text)
	if err != nil {
		t.Fatalf("plantest: %v", err)
	}
	return p
}

// Read is Parse for callers without a test: it returns what is wrong, naming the statement.
func Read(text string) (*plan.Plan, error) {
	parts := plan.Parts{Walker: plan.DefaultWalker(), Sheet: plan.Sheet{Unit: "m"}}
	for line := range strings.Lines(text) {
		line, _, _ = strings.Cut(line, "#")
		for statement := range strings.SplitSeq(line, ";") {
			fields := strings.Fields(statement)
			if len(fields) == 0 {
				continue
			}
			s := words{settings: map[string]string{}}
			err := s.split(fields)
			if err == nil {
				err = s.add(&parts)
			}
			if err != nil {
				return nil, fmt.Errorf("%q: %w", strings.TrimSpace(statement), err)
			}
		}
	}
	return plan.From(parts), nil
}

// words is one statement taken apart.
type words struct {
	head     string
	points   []exact.Pt
	flags    []string
	settings map[string]string
	err      error // the first setting that could not be read
}

func (s *words) split(fields []string) error {
	s.head = fields[0]
	for _, f := range fields[1:] {
		if key, value, ok := strings.Cut(f, "="); ok {
			s.settings[key] = value
		} else if x, y, ok := strings.Cut(f, ","); ok {
			px, err := length(x)
			if err != nil {
				return err
			}
			py, err := length(y)
			if err != nil {
				return err
			}
			s.points = append(s.points, exact.Pt{X: px, Y: py})
		} else {
			s.flags = append(s.flags, f)
		}
	}
	return nil
}

// length reads metres with at most four decimals as grid units.
func length(text string) (int32, error) {
	whole, part, _ := strings.Cut(text, ".")
	if len(part) > 4 {
		return 0, fmt.Errorf("%s: finer than the grid of 0.1 mm", text)
	}
	v, err := strconv.ParseInt(whole+part+strings.Repeat("0", 4-len(part)), 10, 32)
	if err != nil {
		return 0, fmt.Errorf("%s: not a length", text)
	}
	return int32(v), nil
}

// take returns a setting and marks it as read.
func (s *words) take(key string) (string, bool) {
	v, ok := s.settings[key]
	delete(s.settings, key)
	return v, ok
}

func (s *words) length(key string, fallback int32) int32 {
	v, ok := s.take(key)
	if !ok {
		return fallback
	}
	n, err := length(v)
	if err != nil && s.err == nil {
		s.err = fmt.Errorf("%s: %w", key, err)
	}
	return n
}

func (s *words) number(key string, fallback float64) float64 {
	v, ok := s.take(key)
	if !ok {
		return fallback
	}
	f, err := strconv.ParseFloat(v, 64)
	if err != nil && s.err == nil {
		s.err = fmt.Errorf("%s: %s: not a number", key, v)
	}
	return f
}

// choice reads a setting that must be one of the names; it returns the name's index.
func (s *words) choice(key string, names ...string) int {
	v, ok := s.take(key)
	if !ok {
		return 0
	}
	for i, n := range names {
		if n == v {
			return i
		}
	}
	if s.err == nil {
		s.err = fmt.Errorf("%s: %s: not one of %s", key, v, strings.Join(names, ", "))
	}
	return 0
}

func (s *words) flag(name string) bool {
	for i, f := range s.flags {
		if f == name {
			s.flags = append(s.flags[:i], s.flags[i+1:]...)
			return true
		}
	}
	return false
}

func (s *words) id(letter string, have int) string {
	if v, ok := s.take("id"); ok {
		return v
	}
	return letter + strconv.Itoa(have+1)
}

// need reports whether the statement has at least n points.
func (s *words) need(n int) bool {
	if len(s.points) < n && s.err == nil {
		s.err = fmt.Errorf("has %d points, needs %d", len(s.points), n)
	}
	return len(s.points) >= n
}

// done returns the first fault, counting settings and flags that nobody read.
func (s *words) done() error {
	if s.err != nil {
		return s.err
	}
	for key := range s.settings {
		return fmt.Errorf("unknown setting %s", key)
	}
	if len(s.flags) > 0 {
		return fmt.Errorf("unknown word %s", s.flags[0])
	}
	return nil
}
