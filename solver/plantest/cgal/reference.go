package cgal

import (
	"bufio"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"strconv"
	"strings"
	"testing"

	"enfilade/solver/arrange"
	"enfilade/solver/exact"
)

// Reference is CGAL at the other end of a pipe. It is not for concurrent use.
type Reference struct {
	t    testing.TB
	in   *bufio.Writer
	out  *bufio.Reader
	pipe io.Closer
}

// ErrInside is the answer to a question from a place inside a body or off the floor.
var ErrInside = errors.New("cgal: inside a body or off the floor")

// Start starts the program, compiling it first when needed, and ends it with the test. It skips the test under -short
// and fails it when CGAL is not installed.
func Start(t testing.TB) *Reference {
	t.Helper()
	if testing.Short() {
		t.Skip("compares with CGAL; not under -short")
	}
	path, err := binary()
	if err != nil {
		t.Fatal(err)
	}
	cmd := exec.Command(path)
	cmd.Stderr = os.Stderr
	// The C library would hand memory back to the system after every question and ask for it anew.
	cmd.Env = append(os.Environ(), "MALLOC_TRIM_THRESHOLD_=1000000000", "MALLOC_MMAP_THRESHOLD_=1000000000", "MALLOC_TOP_PAD_=64000000")
	in, err := cmd.StdinPipe()
	if err != nil {
		t.Fatal(err)
	}
	out, err := cmd.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		in.Close()
		if err := cmd.Wait(); err != nil {
			t.Errorf("cgal: the reference program ended badly: %v", err)
		}
	})
	return &Reference{t: t, in: bufio.NewWriter(in), out: bufio.NewReader(out), pipe: in}
}

// Plan sets the graph that later questions are about, as an eye at the given height meets it: what is lower stops walking
// only.
func (r *Reference) Plan(g *arrange.Graph, eye int32) {
	r.t.Helper()
	fmt.Fprintln(r.in, "plan", len(g.Pts), len(g.Edges), len(g.Bodies))
	for _, p := range g.Pts {
		fmt.Fprintln(r.in, p.X, p.Y)
	}
	for _, e := range g.Edges {
		winds := g.Winds[e.Wind0:e.Wind1]
		fmt.Fprint(r.in, e.A, e.B, stops(e.Stops, eye), len(winds))
		for _, w := range winds {
			fmt.Fprint(r.in, " ", w.Body, w.Delta)
		}
		fmt.Fprintln(r.in)
	}
	for _, b := range g.Bodies {
		fmt.Fprintln(r.in, stops(b.Stops, eye))
	}
	n, err := r.numbers(2)
	if err != nil {
		r.t.Fatal(err)
	}
	if int(n[0]) != len(g.Pts) || int(n[1]) != len(g.Edges) {
		r.t.Fatalf("cgal: read %v points and edges, sent %d and %d", n, len(g.Pts), len(g.Edges))
	}
}

// stops writes what something stops as the program reads it: 1 sight, 2 walking. What reaches the eye stops sight.
func stops(s arrange.Stops, eye int32) int {
	sum := 0
	if s.Top > 0 && s.Top >= eye {
		sum++
	}
	if s.Walk {
		sum += 2
	}
	return sum
}

// ask sends one question and returns the numbers of its answer.
func (r *Reference) ask(n int, question string, points ...exact.Pt) ([]float64, error) {
	r.in.WriteString(question)
	for _, p := range points {
		fmt.Fprint(r.in, " ", p.X, " ", p.Y)
	}
	r.in.WriteByte('\n')
	return r.numbers(n)
}

func (r *Reference) numbers(n int) ([]float64, error) {
	if err := r.in.Flush(); err != nil {
		r.t.Fatalf("cgal: %v", err)
	}
	line, err := r.out.ReadString('\n')
	if err != nil {
		r.t.Fatalf("cgal: no answer: %v", err)
	}
	line = strings.TrimSpace(line)
	if why, bad := strings.CutPrefix(line, "error "); bad {
		if why == "inside" {
			return nil, ErrInside
		}
		return nil, errors.New("cgal: " + why)
	}
	words := strings.Fields(line)
	if len(words) != n {
		r.t.Fatalf("cgal: wanted %d numbers, got %q", n, line)
	}
	list := make([]float64, n)
	for i, w := range words {
		if list[i], err = strconv.ParseFloat(w, 64); err != nil {
			r.t.Fatalf("cgal: %v", err)
		}
	}
	return list, nil
}
