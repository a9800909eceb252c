package gui

import (
	"bytes"
	"errors"
	"io"
	"sync"
	"testing"
	"testing/synctest"
	"time"

	"enfilade/fileio/planfile"
	"enfilade/fileio/store"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// memory is a shelter that holds its copies in memory and counts.
type memory struct {
	mu     sync.Mutex
	copies map[int]string
	notes  map[int]store.Note
	writes int
	fail   error
	slow   time.Duration
}

func (m *memory) Keep(n int, note store.Note, write func(io.Writer) error) error {
	time.Sleep(m.slow)
	m.mu.Lock()
	defer m.mu.Unlock()
	m.writes++
	if m.fail != nil {
		return m.fail
	}
	var b bytes.Buffer
	if err := write(&b); err != nil {
		return err
	}
	if m.copies == nil {
		m.copies, m.notes = map[int]string{}, map[int]store.Note{}
	}
	m.copies[n], m.notes[n] = b.String(), note
	return nil
}

func (m *memory) Drop(n int) error {
	m.mu.Lock()
	defer m.mu.Unlock()
	delete(m.copies, n)
	return nil
}

func (m *memory) held(n int) string {
	m.mu.Lock()
	defer m.mu.Unlock()
	return m.copies[n]
}

// drawn is a plan with so many observers.
func drawn(t *testing.T, n int) *plan.Plan {
	t.Helper()
	p := plan.New()
	for i := range n {
		next, err := plan.AddObserver{Observer: plan.Observer{At: exact.Pt{X: int32(i) * 10000}, Eye: 16000, View: 360, Colour: -1}}.Apply(p)
		if err != nil {
			t.Fatal(err)
		}
		p = next
	}
	return p
}

func TestKeeperCopiesEveryTwentySeconds(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		m := &memory{}
		k := newKeeper(m, time.Now, nil)
		defer k.close()
		one, two := drawn(t, 1), drawn(t, 2)
		k.note(7, unsaved{plan: one, path: "/plans/a.enfilade"})
		time.Sleep(keepEvery - time.Second)
		synctest.Wait()
		if m.held(7) != "" {
			t.Error("copied before its time")
		}
		k.note(7, unsaved{plan: two, path: "/plans/a.enfilade"})
		time.Sleep(time.Second + 1)
		synctest.Wait()
		if m.held(7) != text(t, two) {
			t.Errorf("after %v the copy holds %q, want the newest plan", keepEvery, m.held(7))
		}
		if n := m.notes[7]; n.Path != "/plans/a.enfilade" || time.Since(n.At) > time.Second {
			t.Errorf("the note says %+v", n)
		}
		time.Sleep(10 * keepEvery)
		synctest.Wait()
		if m.writes != 1 {
			t.Errorf("a plan that did not change was written %d times", m.writes)
		}
		k.forget(7)
		synctest.Wait()
		if m.held(7) != "" {
			t.Error("the copy of a saved plan stays")
		}
	})
}

// TestKeeperNeverHoldsUpTheWindow: noting work takes no time while a copy is being written, and the newest is written next.
func TestKeeperNeverHoldsUpTheWindow(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		m := &memory{slow: 5 * time.Second}
		k := newKeeper(m, time.Now, nil)
		defer k.close()
		k.note(0, unsaved{plan: drawn(t, 1)})
		time.Sleep(keepEvery + time.Second) // in the middle of writing
		began := time.Now()
		k.note(0, unsaved{plan: drawn(t, 2)})
		k.forget(1)
		if d := time.Since(began); d != 0 {
			t.Errorf("noting took %v", d)
		}
		time.Sleep(2 * keepEvery)
		synctest.Wait()
		if m.held(0) != text(t, drawn(t, 2)) {
			t.Error("what was noted during a write is never written")
		}
	})
}

func TestKeeperTellsOnceWhenItCannot(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		m := &memory{fail: errors.New("disk full")}
		var told []error
		k := newKeeper(m, time.Now, func(err error) { told = append(told, err) })
		k.note(0, unsaved{plan: drawn(t, 1)})
		time.Sleep(3*keepEvery + 1)
		synctest.Wait()
		if len(told) != 1 || told[0] == nil {
			t.Errorf("told %v, want the fault once", told)
		}
		m.fail = nil
		k.close() // copies what is unsaved
		if len(told) != 2 || told[1] != nil || m.held(0) == "" {
			t.Errorf("told %v; the copy holds %q", told, m.held(0))
		}
	})
}

// TestPanicKeepsTheWork: a panic beside the window still copies what is unsaved.
func TestPanicKeepsTheWork(t *testing.T) {
	m := &memory{}
	d := &desk{keeper: newKeeper(m, time.Now, nil)}
	defer d.keeper.close()
	d.keeper.note(0, unsaved{plan: drawn(t, 1)})
	func() {
		defer func() { _ = recover() }()
		d.guarded(func() { panic("no such wall") })
	}()
	if m.held(0) == "" {
		t.Error("nothing was copied")
	}
}

func TestErrandsGoInTurn(t *testing.T) {
	synctest.Test(t, func(t *testing.T) {
		var order []int
		queue := make(chan func(), 10)
		e := &errands{do: func(f func()) { queue <- f }, guard: func(f func()) { f() }}
		for i := range 3 {
			e.run(func() func() {
				time.Sleep(time.Duration(3-i) * time.Second)
				return func() { order = append(order, i) }
			})
		}
		synctest.Wait()
		time.Sleep(10 * time.Second)
		for range 3 {
			(<-queue)()
		}
		if order[0] != 0 || order[1] != 1 || order[2] != 2 {
			t.Errorf("done in the order %v", order)
		}
	})
}

// readBack is the plan that a copy holds.
func readBack(t *testing.T, copied string) *plan.Plan {
	t.Helper()
	p, err := planfile.Read(bytes.NewReader([]byte(copied)), "copy")
	if err != nil {
		t.Fatal(err)
	}
	return p
}
