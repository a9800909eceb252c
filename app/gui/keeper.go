package gui

import (
	"io"
	"sync"
	"time"

	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/plan"
)

// keepEvery is how often unsaved work is copied to where it outlives the program.
const keepEvery = 20 * time.Second

// shelter is where the keeper puts its copies: a store.Shelter.
type shelter interface {
	Keep(n int, note store.Note, write func(io.Writer) error) error
	Drop(n int) error
}

// keeper keeps a copy of each window's unsaved work. Windows tell it their newest plan, which costs them nothing; it writes
// on a goroutine of its own, for plans never change. The user's own files it never touches.
type keeper struct {
	shelter shelter
	now     func() time.Time
	told    func(error) // called on the keeper's goroutine: nil when copies are kept again

	mu     sync.Mutex
	newest map[int]unsaved // by window; what is missing has nothing unsaved

	writing sync.Mutex // held while copies are written
	kept    map[int]*plan.Plan
	failing bool

	stop, stopped chan struct{}
	soon          chan struct{}
}

// unsaved is work that no file holds.
type unsaved struct {
	plan  *plan.Plan
	path  string      // of its file; empty when it has none yet
	print store.Print // of that file when it was last read or written
}

// newKeeper starts a keeper. Close ends it.
func newKeeper(s shelter, now func() time.Time, told func(error)) *keeper {
	k := &keeper{shelter: s, now: now, told: told, newest: map[int]unsaved{}, kept: map[int]*plan.Plan{},
		stop: make(chan struct{}), stopped: make(chan struct{}), soon: make(chan struct{}, 1)}
	go k.run()
	return k
}

func (k *keeper) run() {
	defer close(k.stopped)
	tick := time.NewTicker(keepEvery)
	defer tick.Stop()
	for {
		select {
		case <-tick.C:
			k.flush()
		case <-k.soon:
			k.drop()
		case <-k.stop:
			return
		}
	}
}

// note takes a window's newest unsaved work, to be copied before long. It never waits for a file.
func (k *keeper) note(window int, u unsaved) {
	if k == nil {
		return
	}
	k.mu.Lock()
	defer k.mu.Unlock()
	k.newest[window] = u
}

// forget takes note that a window has nothing unsaved any more; its copy is taken away soon.
func (k *keeper) forget(window int) {
	if k == nil {
		return
	}
	k.mu.Lock()
	delete(k.newest, window)
	k.mu.Unlock()
	select {
	case k.soon <- struct{}{}:
	default:
	}
}

// flush copies at once what has changed since the last time, and takes away the copies of what is saved.
func (k *keeper) flush() {
	if k == nil {
		return
	}
	k.writing.Lock()
	defer k.writing.Unlock()
	for n, u := range k.snapshot() {
		if k.kept[n] == u.plan {
			continue
		}
		note := store.Note{Path: u.path, Title: u.plan.Sheet().Title, At: k.now(), Print: u.print}
		err := k.shelter.Keep(n, note, func(w io.Writer) error { return planfile.Write(w, u.plan) })
		if err == nil {
			k.kept[n] = u.plan
		}
		if k.told != nil && (err != nil) != k.failing {
			k.failing = err != nil
			k.told(err)
		}
	}
	k.dropSaved()
}

// drop takes away the copies of what is saved.
func (k *keeper) drop() {
	k.writing.Lock()
	defer k.writing.Unlock()
	k.dropSaved()
}

func (k *keeper) dropSaved() {
	newest := k.snapshot()
	for n := range k.kept {
		if _, still := newest[n]; !still && k.shelter.Drop(n) == nil {
			delete(k.kept, n)
		}
	}
}

// snapshot returns what is unsaved now.
func (k *keeper) snapshot() map[int]unsaved {
	k.mu.Lock()
	defer k.mu.Unlock()
	now := make(map[int]unsaved, len(k.newest))
	for n, u := range k.newest {
		now[n] = u
	}
	return now
}

// close ends the keeper after a last look: what is unsaved then is copied.
func (k *keeper) close() {
	if k == nil {
		return
	}
	close(k.stop)
	<-k.stopped
	k.flush()
}

// guarded does f; when f panics, unsaved work is copied before the program goes down.
func (d *desk) guarded(f func()) {
	done := false
	defer func() {
		if !done {
			d.keeper.flush()
		}
	}()
	f()
	done = true
}

// noted is what the keeper knows of a window.
type noted struct {
	plan *plan.Plan // nil when there is nothing unsaved
	path string
}

// keep tells the keeper what is unsaved, when that has changed.
func (w *window) keep() {
	now := noted{}
	if w.unsaved() {
		now = noted{w.session.Committed(), w.session.Path()}
	}
	if now == w.noted || w.closing {
		return
	}
	w.noted = now
	if now.plan == nil {
		w.desk.keeper.forget(w.number)
		return
	}
	w.desk.keeper.note(w.number, unsaved{now.plan, now.path, w.print})
}
