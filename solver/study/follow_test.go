package study_test

import (
	"context"
	"fmt"
	"math/rand/v2"
	"os"
	"reflect"
	"runtime"
	"strconv"
	"testing"

	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
	"enfilade/solver/study"
)

// TestSolverFollows makes random edits, and holds what a solver that follows them says against a new solver's answers, bit
// for bit. ENFILADE_EDITS sets the number of edits, 600 by default.
func TestSolverFollows(t *testing.T) {
	edits := 600
	if n, err := strconv.Atoi(os.Getenv("ENFILADE_EDITS")); err == nil {
		edits = n
	}
	ctx := context.Background()
	before := runtime.NumGoroutine()
	for part, first := range []*plan.Plan{plantest.Office(3, 60), plantest.Clutter(4, 40), plantest.Maze(5, 40)} {
		r := rand.New(rand.NewPCG(uint64(part), 11))
		s := study.NewSolver()
		p := first
		for k := range edits / 3 {
			if k%50 == 0 {
				p = first
			}
			if q, err := randomEdit(r, p).Apply(p); err == nil {
				p = q
			}
			got, err := s.Solve(ctx, p)
			if err != nil {
				t.Fatalf("plan %d, edit %d: %v", part, k, err)
			}
			want, err := study.Solve(ctx, p)
			if err != nil {
				t.Fatal(err)
			}
			if !reflect.DeepEqual(got, want) {
				t.Fatalf("plan %d, edit %d: %s", part, k, difference(got, want))
			}
		}
	}
	if after := runtime.NumGoroutine(); after > before {
		t.Errorf("%d goroutines before, %d after", before, after)
	}
}

// randomEdit moves one to three things, or deletes or doubles one.
func randomEdit(r *rand.Rand, p *plan.Plan) plan.Edit {
	refs := everything(p)
	r.Shuffle(len(refs), func(i, j int) { refs[i], refs[j] = refs[j], refs[i] })
	switch r.IntN(12) {
	case 0:
		return plan.Delete{Items: refs[:1]}
	case 1:
		a := exact.Pt{X: r.Int32N(200000), Y: r.Int32N(200000)}
		return plan.AddWall{Wall: plan.Wall{Line: plan.ChainOf(a, a.Add(exact.Vec{X: 1 + r.Int32N(30000), Y: r.Int32N(30000)})), Height: plan.Ceiling, Thickness: 1000}}
	}
	step := []int32{3, 800, 10000}[r.IntN(3)]
	return plan.MoveItems{Items: refs[:1+r.IntN(3)], By: exact.Vec{X: r.Int32N(2*step) - step, Y: r.Int32N(2*step) - step}}
}

func everything(p *plan.Plan) []plan.Ref {
	var refs []plan.Ref
	for _, w := range p.Walls() {
		refs = append(refs, plan.Ref{Kind: plan.KindWall, ID: w.ID})
	}
	for _, b := range p.Blocks() {
		refs = append(refs, plan.Ref{Kind: plan.KindBlock, ID: b.ID})
	}
	for _, o := range p.Observers() {
		refs = append(refs, plan.Ref{Kind: plan.KindObserver, ID: o.ID})
	}
	for _, s := range p.Starts() {
		refs = append(refs, plan.Ref{Kind: plan.KindStart, ID: s.ID})
	}
	return refs
}

// difference names the first entry that differs.
func difference(got, want *study.Result) string {
	g, w := reflect.ValueOf(*got), reflect.ValueOf(*want)
	for i := range g.NumField() {
		a, b := g.Field(i), w.Field(i)
		if reflect.DeepEqual(a.Interface(), b.Interface()) {
			continue
		}
		name := g.Type().Field(i).Name
		if a.Kind() == reflect.Slice && a.Len() == b.Len() {
			for k := range a.Len() {
				if !reflect.DeepEqual(a.Index(k).Interface(), b.Index(k).Interface()) {
					return fmt.Sprintf("%s[%d]:\n%+v\n%+v", name, k, a.Index(k).Interface(), b.Index(k).Interface())
				}
			}
		}
		return fmt.Sprintf("%s:\n%+v\n%+v", name, a.Interface(), b.Interface())
	}
	return "nothing"
}
