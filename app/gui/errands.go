package gui

import "sync"

// errands does slow work, such as reading and writing files, on a goroutine beside the window, one piece after the other.
type errands struct {
	do     func(func()) // runs a function on the toolkit's goroutine
	guard  func(func()) // the work is done within it
	inline bool         // tests: everything at once on the caller's goroutine

	mu   sync.Mutex
	jobs []func() func()
	busy bool
}

// run does job beside the window, and then what job returns on the window's goroutine; that may be nil.
func (e *errands) run(job func() (then func())) {
	if e.inline {
		if then := job(); then != nil {
			then()
		}
		return
	}
	e.mu.Lock()
	defer e.mu.Unlock()
	e.jobs = append(e.jobs, job)
	if !e.busy {
		e.busy = true
		go e.guard(e.work)
	}
}

// work does what waits, and ends when nothing does.
func (e *errands) work() {
	for {
		e.mu.Lock()
		if len(e.jobs) == 0 {
			e.busy = false
			e.mu.Unlock()
			return
		}
		job := e.jobs[0]
		e.jobs = e.jobs[1:]
		e.mu.Unlock()
		if then := job(); then != nil {
			e.do(then)
		}
	}
}
