package session_test

import (
	"errors"
	"fmt"
	"testing"

	"pgregory.net/rapid"

	"enfilade/app/session"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// edit is an edit for tests: it changes what fn changes.
type edit struct {
	label string
	fn    func(*plan.Parts) error
}

func (e edit) Label() string { return e.label }

func (e edit) Apply(p *plan.Plan) (*plan.Plan, error) {
	parts := p.Parts()
	if err := e.fn(&parts); err != nil {
		return nil, err
	}
	return plan.From(parts), nil
}

// same is an edit that changes nothing.
type same struct{}

func (same) Label() string                          { return "nothing" }
func (same) Apply(p *plan.Plan) (*plan.Plan, error) { return p, nil }
func addObserver(id string, x int32) plan.Edit {
	return edit{"add " + id, func(p *plan.Parts) error {
		p.Observers = append(p.Observers, plan.Observer{ID: id, At: exact.Pt{X: x}})
		return nil
	}}
}

func dropAll() plan.Edit {
	return edit{"drop all", func(p *plan.Parts) error { p.Observers = nil; return nil }}
}

var errNo = errors.New("no")

func failing() plan.Edit { return edit{"fail", func(*plan.Parts) error { return errNo }} }

// model is the obvious session: two stacks.
type model struct {
	undo, redo       []*plan.Plan
	undoL, redoL     []string
	committed, shown *plan.Plan
	saved            *plan.Plan
}

func (m *model) check(t *rapid.T, s *session.Session, told *plan.Plan, rev uint64) {
	if s.Plan() != m.shown || s.Committed() != m.committed {
		t.Fatalf("shown %p, committed %p; want %p, %p", s.Plan(), s.Committed(), m.shown, m.committed)
	}
	if s.Previewing() != (m.shown != m.committed) {
		t.Fatalf("Previewing = %v", s.Previewing())
	}
	if told != s.Plan() || rev != s.Rev() {
		t.Fatalf("last told plan %p at %d, session shows %p at %d", told, rev, s.Plan(), s.Rev())
	}
	if s.Dirty() != (m.committed != m.saved) {
		t.Fatalf("Dirty = %v", s.Dirty())
	}
	checkLabel(t, "undo", m.undoL, s.UndoLabel)
	checkLabel(t, "redo", m.redoL, s.RedoLabel)
	for _, r := range s.Selection() {
		if _, ok := s.Plan().Observer(r.ID); !ok {
			t.Fatalf("selected %v is not in the plan", r)
		}
	}
}

func checkLabel(t *rapid.T, what string, stack []string, got func() (string, bool)) {
	label, ok := got()
	if ok != (len(stack) > 0) || ok && label != stack[len(stack)-1] {
		t.Fatalf("%s label %q %v, want top of %v", what, label, ok, stack)
	}
}

func pop[T any](s *[]T) T {
	v := (*s)[len(*s)-1]
	*s = (*s)[:len(*s)-1]
	return v
}

// TestSessionLaws drives a session and the obvious model with the same random steps.
func TestSessionLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var told *plan.Plan
		var rev uint64
		s := session.New(plan.New(), "", func(r uint64, p *plan.Plan) {
			if r <= rev {
				t.Fatalf("revision %d told after %d", r, rev)
			}
			told, rev = p, r
		})
		m := &model{committed: s.Plan(), shown: s.Plan(), saved: s.Plan()}
		n := int32(0)
		next := func() plan.Edit { n++; return addObserver(fmt.Sprintf("O%d", n), n) }
		t.Repeat(map[string]func(*rapid.T){
			"do": func(t *rapid.T) {
				e := next()
				if err := s.Do(e); err != nil {
					t.Fatal(err)
				}
				m.undo, m.undoL = append(m.undo, m.committed), append(m.undoL, e.Label())
				m.redo, m.redoL = nil, nil
				m.committed, m.shown = s.Committed(), s.Committed()
				if m.committed == m.undo[len(m.undo)-1] {
					t.Fatal("Do changed nothing")
				}
			},
			"do nothing": func(t *rapid.T) {
				if err := s.Do(same{}); err != nil {
					t.Fatal(err)
				}
				m.shown = m.committed
			},
			"do fails": func(t *rapid.T) {
				if err := s.Do(failing()); !errors.Is(err, errNo) {
					t.Fatalf("Do(failing) = %v", err)
				}
				m.shown = m.committed
			},
			"preview": func(t *rapid.T) {
				if err := s.Preview(next()); err != nil {
					t.Fatal(err)
				}
				m.shown = s.Plan()
				if s.Plan().NumObservers() != s.Committed().NumObservers()+1 {
					t.Fatal("preview is not the committed plan and one edit")
				}
			},
			"preview fails": func(t *rapid.T) {
				if err := s.Preview(failing()); !errors.Is(err, errNo) {
					t.Fatalf("Preview(failing) = %v", err)
				}
			},
			"preview nothing": func(t *rapid.T) {
				if err := s.Preview(same{}); err != nil {
					t.Fatal(err)
				}
				m.shown = m.committed
			},
			"cancel": func(t *rapid.T) { s.Cancel(); m.shown = m.committed },
			"undo": func(t *rapid.T) {
				want := m.shown != m.committed || len(m.undo) > 0
				if got := s.Undo(); got != want {
					t.Fatalf("Undo = %v, want %v", got, want)
				}
				if m.shown == m.committed && len(m.undo) > 0 {
					m.redo, m.redoL = append(m.redo, m.committed), append(m.redoL, pop(&m.undoL))
					m.committed = pop(&m.undo)
				}
				m.shown = m.committed
			},
			"redo": func(t *rapid.T) {
				if got, want := s.Redo(), len(m.redo) > 0; got != want {
					t.Fatalf("Redo = %v, want %v", got, want)
				}
				if len(m.redo) > 0 {
					m.undo, m.undoL = append(m.undo, m.committed), append(m.undoL, pop(&m.redoL))
					m.committed = pop(&m.redo)
				}
				m.shown = m.committed
			},
			"select": func(t *rapid.T) {
				var refs []plan.Ref
				for r := range session.All(s.Plan()) {
					refs = append(refs, r)
				}
				if len(refs) == 0 {
					t.Skip("nothing to select")
				}
				s.Toggle(rapid.SampledFrom(refs).Draw(t, "ref"))
			},
			"save": func(t *rapid.T) { s.Saved(s.Committed(), "x.enfilade"); m.saved = m.committed },
			"":     func(t *rapid.T) { m.check(t, s, told, rev) },
		})
	})
}

func TestDoubleUndoGivesTheSamePlan(t *testing.T) {
	s := session.New(plan.New(), "a", nil)
	first := s.Plan()
	_ = s.Do(addObserver("O1", 1))
	second := s.Plan()
	s.Undo()
	if s.Plan() != first || s.Dirty() {
		t.Error("undo did not give back the plan that was opened")
	}
	s.Redo()
	if s.Plan() != second || !s.Dirty() {
		t.Error("redo did not give back the plan that was undone")
	}
}

func TestSelectionFollowsThePlan(t *testing.T) {
	s := session.New(plan.New(), "", nil)
	_ = s.Do(addObserver("O1", 1))
	_ = s.Do(addObserver("O2", 2))
	o1, o2 := plan.Ref{Kind: plan.KindObserver, ID: "O1"}, plan.Ref{Kind: plan.KindObserver, ID: "O2"}
	s.Select(o1, o1, o2, plan.Ref{Kind: plan.KindWall, ID: "W9"})
	if len(s.Selection()) != 2 {
		t.Fatalf("selection %v, want O1 and O2 once each", s.Selection())
	}
	s.Undo()
	if got := s.Selection(); len(got) != 1 || got[0] != o1 {
		t.Errorf("after undo selection %v, want O1 alone", got)
	}
	_ = s.Do(dropAll())
	if len(s.Selection()) != 0 {
		t.Errorf("selection %v of an empty plan", s.Selection())
	}
}

func TestOpenStartsAfresh(t *testing.T) {
	s := session.New(plan.New(), "", nil)
	_ = s.Do(addObserver("O1", 1))
	s.Select(plan.Ref{Kind: plan.KindObserver, ID: "O1"})
	s.Open(plan.New(), "b")
	if _, ok := s.UndoLabel(); ok || s.Dirty() || len(s.Selection()) != 0 || s.Path() != "b" {
		t.Error("Open kept history, dirt, selection or path of the plan before")
	}
	s.OpenUnsaved(plan.New())
	if !s.Dirty() || s.Path() != "" {
		t.Error("a plan that no file holds must count as unsaved")
	}
}
