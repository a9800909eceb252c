package gui

import (
	"image"
	"slices"
	"strings"
	"sync/atomic"
	"time"

	"enfilade/app/live"
	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/view"
	"enfilade/solver/plan"
	"enfilade/solver/study"
)

// picture draws the plan view's frames: a base that changes seldom, made by a worker, and over it what may change every
// frame. It belongs to the toolkit's goroutine; only the worker runs beside it.
type picture struct {
	w       *window
	frame   raster.Frame
	overlay paint.List
	worker  *baseWorker
	base    *madeBase
	warp    warper
}

// baseKey is all that a base depends on.
type baseKey struct {
	obstacles *plan.Obstacles
	marks     *plan.Marks // of a plan that gives no floor, whose floor follows its marks
	eye       int32
	camera    view.Camera
	dark      bool
	held      string
	without   paint.Layers
	underlay  *plan.Underlay
	photo     *paint.Photo
	contours  *study.Contour // the first of the lines of walking distance
	old       bool           // those lines are out of date
}

// madeBase is a base that was made.
type madeBase struct {
	key     baseKey
	base    *raster.Base
	drawing *paint.Drawing
	took    time.Duration
	opened  uint64
}

// soon is how long a base may take to be made in the middle of a frame: a pan then shows no seam. What takes longer is
// left to the worker.
const soon = 6 * time.Millisecond

func newPicture(w *window) *picture {
	return &picture{w: w, worker: newBaseWorker(w.desk.guarded, func() { w.do(func() { w.view.Refresh() }) })}
}

// close ends the worker.
func (p *picture) close() { p.worker.close() }

// draw makes the frame for the toolkit's raster, in device pixels.
func (p *picture) draw(w, h int) image.Image {
	v := p.w.view
	if w <= 0 || h <= 0 {
		return image.NewRGBA(image.Rect(0, 0, max(w, 1), max(h, 1)))
	}
	pix := v.pix
	if size := v.Size(); size.Width > 0 {
		pix = float32(w) / size.Width
	}
	if v.cam.W != w || v.cam.H != h || v.pix != pix {
		v.resized(w, h, pix)
		p.w.do(p.w.acted) // handles and the snap's step stand where the camera was
	}
	scene := p.scene()
	under := p.baseFor(scene)
	if under == nil {
		return p.warp.paper(w, h, scene.Theme.Ground)
	}
	scene.Drawing = p.base.drawing
	paint.Overlay(scene, &p.overlay)
	return p.frame.Draw(under, &p.overlay)
}

// mostHeld is how many items a drag may hold for them to be drawn anew in each frame. Of more the whole picture is: the worker makes
// bases of the plan as it is in the midst of the drag, as fast as it can, and the frames show the newest.
const mostHeld = 300

// scene gathers all that the picture depends on.
func (p *picture) scene() *paint.Scene {
	w := p.w
	r := &w.results
	pr := r.shownPair()
	s := &paint.Scene{
		Plan: w.session.Plan(), Result: r.result, Camera: w.view.cam, Theme: themed(),
		Stale:    r.stale(live.StageSights),
		Observer: r.shownObserver(), Start: pr.start, Target: pr.target,
		Selected: w.outlined(), Hover: w.sketch.Hover, AllRegions: r.all,
	}
	if sel := w.session.Selection(); len(sel) == 1 && sel[0].Kind == plan.KindTarget && r.passing == "" {
		s.SeenFrom, s.Stale = sel[0].ID, r.stale(live.StageSeenFrom)
	}
	if d := w.distances(); d != nil {
		s.Contours, s.ContourStep, s.ContoursOld = d.Lines, d.Step, r.stale(live.StageDistances)
	}
	if d := w.sketch.Dragged; w.session.Previewing() && len(d) <= mostHeld && !slices.Contains(d, plan.Ref{Kind: plan.KindFloor}) {
		s.Old, s.Dragged = w.session.Committed(), w.sketch.Dragged
	}
	if u := s.Plan.Sheet().Underlay; u != nil && u.Image == w.under.path {
		s.Photo = w.under.photo
	}
	w.showLayers(s)
	if w.view.inside {
		x, y := w.view.place()
		s.Pointer = &[2]float64{x, y}
	}
	return s
}

// keyOf returns what the base of a scene depends on.
func keyOf(s *paint.Scene) baseKey {
	shown := s.Plan
	if s.Old != nil {
		shown = s.Old
	}
	k := baseKey{obstacles: shown.Obstacles(), eye: shown.Walker().Eye, camera: s.Camera, dark: s.Theme == dark}
	k.without = s.Without & (paint.LayerGrid | paint.LayerUnderlay)
	if s.Photo != nil {
		k.underlay, k.photo = s.Plan.Sheet().Underlay, s.Photo
	}
	if shown.Floor().Len() == 0 {
		k.marks = shown.Marks()
	}
	if len(s.Contours) > 0 {
		k.contours, k.old = &s.Contours[0], s.ContoursOld
	}
	var held strings.Builder
	for _, r := range s.Dragged {
		switch r.Kind {
		case plan.KindWall, plan.KindOpening, plan.KindBlock:
			held.WriteString(r.Kind.Letter())
			held.WriteString(r.ID)
			held.WriteByte(';')
		}
	}
	k.held = held.String()
	return k
}

// fewItems is how many walls and blocks a base takes that may be made in the middle of a frame.
const fewItems = 1000

// baseFor returns the base for a scene: the one at hand when it fits, a new one at once when the last one was quick, else the one
// at hand, as the camera sees it, while the worker makes the new one. It is nil while nothing can be shown yet: the plan has just
// been opened, or the theme has changed.
func (p *picture) baseFor(s *paint.Scene) *raster.Base {
	opened := p.w.results.opened
	if b := p.worker.take(); b != nil && b.opened == opened {
		p.base = b
	}
	k := keyOf(s)
	if p.base != nil && p.base.key == k {
		return p.base.base
	}
	few := s.Plan.NumWalls()+s.Plan.NumBlocks() <= fewItems
	likes := p.base != nil && p.base.opened == opened && p.base.key.dark == k.dark
	if few && likes && p.base.took < soon {
		p.base = makeBase(s, k, opened)
		return p.base.base
	}
	if !likes {
		p.worker.ask(s, k, opened)
		return nil
	}
	s.Drawing = p.base.drawing
	p.worker.ask(s, k, opened)
	if p.base.key.camera == k.camera {
		return p.base.base
	}
	return p.warp.show(p.base.base, p.base.key.camera, k.camera, s.Theme.Ground)
}

// makeBase lists and draws a base.
func makeBase(s *paint.Scene, k baseKey, opened uint64) *madeBase {
	began := time.Now()
	list := paint.Base(s)
	base := raster.NewBase(list, k.camera.W, k.camera.H)
	return &madeBase{key: k, base: base, drawing: list.Drawing, took: time.Since(began), opened: opened}
}

// baseWorker makes bases on a goroutine of its own, newest first.
type baseWorker struct {
	slot chan baseJob
	done chan struct{}
	made atomic.Pointer[madeBase]
	last baseKey // the last one asked for, empty once it was taken
	wake func()
}

type baseJob struct {
	scene  paint.Scene
	key    baseKey
	opened uint64
}

// newBaseWorker starts a worker that works within guard, and calls wake when a base is made.
func newBaseWorker(guard func(func()), wake func()) *baseWorker {
	b := &baseWorker{slot: make(chan baseJob, 1), done: make(chan struct{}), wake: wake}
	go guard(b.run)
	return b
}

func (b *baseWorker) run() {
	defer close(b.done)
	for j := range b.slot {
		b.made.Store(makeBase(&j.scene, j.key, j.opened))
		b.wake()
	}
}

// ask asks for a base, in place of one that waits.
func (b *baseWorker) ask(s *paint.Scene, k baseKey, opened uint64) {
	if b.last == k {
		return
	}
	b.last = k
	select {
	case <-b.slot:
	default:
	}
	b.slot <- baseJob{*s, k, opened}
}

// take returns a base made since the last call, nil when there is none. From then on the worker may be asked for it again: the
// picture may come back to it after others that were made in the middle of a frame.
func (b *baseWorker) take() *madeBase {
	m := b.made.Swap(nil)
	if m != nil && m.key == b.last {
		b.last = baseKey{}
	}
	return m
}

func (b *baseWorker) close() {
	if b.slot != nil {
		close(b.slot)
		<-b.done
		b.slot = nil
	}
}
