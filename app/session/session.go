package session

import (
	"slices"

	"enfilade/solver/plan"
)

// Session is one open plan. It is made by [New] and used from one goroutine only.
type Session struct {
	history  history
	preview  *plan.Plan // nil when nothing is previewed
	saved    *plan.Plan // what the file holds; nil when there is nothing of it on disk
	path     string
	rev      uint64
	selected []plan.Ref
	changed  func(rev uint64, p *plan.Plan)
}

// New opens p, which was read from path; path is empty for a plan that has no file yet. changed is called on every change
// of the plan that is shown, and once at once; it may be nil.
func New(p *plan.Plan, path string, changed func(rev uint64, p *plan.Plan)) *Session {
	s := &Session{changed: changed}
	s.Open(p, path)
	return s
}

// Open replaces the plan, its file and its history, and empties the selection.
func (s *Session) Open(p *plan.Plan, path string) {
	s.history = newHistory(p)
	s.preview, s.saved, s.path, s.selected = nil, p, path, nil
	s.tell()
}

// OpenUnsaved is Open for a plan that no file holds, so that it counts as unsaved work from the start.
func (s *Session) OpenUnsaved(p *plan.Plan) {
	s.history = newHistory(p)
	s.preview, s.saved, s.path, s.selected = nil, nil, "", nil
	s.tell()
}

// Plan returns the plan that is shown: the previewed one while there is one, else the committed one.
func (s *Session) Plan() *plan.Plan {
	if s.preview != nil {
		return s.preview
	}
	return s.history.plan()
}

// Committed returns the plan without what is being previewed.
func (s *Session) Committed() *plan.Plan { return s.history.plan() }

// Previewing reports whether a preview is shown.
func (s *Session) Previewing() bool { return s.preview != nil }

// Rev returns the revision of the plan that is shown. It only rises.
func (s *Session) Rev() uint64 { return s.rev }

// Preview shows e applied to the committed plan, so a long drag does not drift. An edit that cannot be applied leaves what
// was shown and returns its error.
func (s *Session) Preview(e plan.Edit) error {
	next, err := e.Apply(s.history.plan())
	if err != nil {
		return err
	}
	shown := s.Plan()
	s.preview = next
	if next == s.history.plan() {
		s.preview = nil
	}
	s.settle(shown)
	return nil
}

// Do applies e to the committed plan as one step of the history; a preview ends. An edit that changes nothing makes no
// step. On an error the preview ends and the committed plan stays.
func (s *Session) Do(e plan.Edit) error {
	shown := s.Plan()
	s.preview = nil
	next, err := e.Apply(s.history.plan())
	if err == nil && next != s.history.plan() {
		s.history.push(e.Label(), next)
	}
	s.settle(shown)
	return err
}

// Cancel ends a preview and shows the committed plan again.
func (s *Session) Cancel() {
	shown := s.Plan()
	s.preview = nil
	s.settle(shown)
}

// Undo takes back the last step, or only the preview while there is one. It reports whether anything changed.
func (s *Session) Undo() bool {
	shown := s.Plan()
	if s.preview != nil {
		s.preview = nil
	} else if !s.history.back() {
		return false
	}
	s.settle(shown)
	return true
}

// Redo does the last undone step again; a preview ends. It reports whether anything changed.
func (s *Session) Redo() bool {
	shown := s.Plan()
	s.preview = nil
	done := s.history.forth()
	s.settle(shown)
	return done
}

// UndoLabel returns the label of the step that Undo would take back; ok is false when there is none.
func (s *Session) UndoLabel() (label string, ok bool) { return s.history.undoLabel() }

// RedoLabel returns the label of the step that Redo would do again; ok is false when there is none.
func (s *Session) RedoLabel() (label string, ok bool) { return s.history.redoLabel() }

// Path returns the plan's file, empty when it has none yet.
func (s *Session) Path() string { return s.path }

// Dirty reports whether the committed plan differs from what the file holds.
func (s *Session) Dirty() bool { return s.history.plan() != s.saved }

// Saved notes that p now is what the file at path holds. p is the plan that was written, which need not be the committed
// one any more.
func (s *Session) Saved(p *plan.Plan, path string) { s.saved, s.path = p, path }

// settle drops what is gone from the selection and tells a change of the plan that is shown.
func (s *Session) settle(shown *plan.Plan) {
	if s.Plan() == shown {
		return
	}
	if !plan.SameItems(shown, s.Plan()) {
		has := s.Plan().Has
		s.selected = slices.DeleteFunc(s.selected, func(r plan.Ref) bool { return !has(r) })
	}
	s.tell()
}

func (s *Session) tell() {
	s.rev++
	if s.changed != nil {
		s.changed(s.rev, s.Plan())
	}
}

// Listen makes changed the function that is told of changes, and tells it at once.
func (s *Session) Listen(changed func(rev uint64, p *plan.Plan)) {
	s.changed = changed
	s.tell()
}
