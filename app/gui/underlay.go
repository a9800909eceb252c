package gui

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"github.com/paulmach/orb"

	"enfilade/canvas/paint"
	"enfilade/canvas/raster"
	"enfilade/canvas/tool"
	"enfilade/fileio/store"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// photoSuffix ends the names of the pictures that may be traced over.
const photoSuffix = ".png|.jpg|.jpeg"

// underlayStrength is the opacity of a picture that is laid under the plan.
const underlayStrength = 0.4

// underlay is the picture to trace over, as the window holds it: its pixels, read and decoded beside the window. In the
// window's plan its path is absolute; the plan file holds it relative to itself.
type underlay struct {
	path    string // of the picture that is shown or being read
	photo   *paint.Photo
	fault   string // why there is no picture
	loading bool
	offered [2]string // the plan's and the picture's path for which a copy was offered last
	errands errands
}

var theUnderlay = plan.Ref{Kind: plan.KindUnderlay}

// isPhoto reports whether a file's name is that of a picture.
func isPhoto(path string) bool { return hasSuffix(path, photoSuffix) }

// followUnderlay reads the plan's underlay when it is another one than the window holds.
func (w *window) followUnderlay(p *plan.Plan) {
	u := p.Sheet().Underlay
	if _, ours := w.tool.(*tool.Underlay); ours && u == nil {
		w.tool = tools[0].make()
	}
	if u == nil || u.Image == w.under.path {
		return
	}
	w.loadUnderlay(u.Image)
}

func (w *window) loadUnderlay(path string) {
	w.under.path, w.under.photo, w.under.fault, w.under.loading = path, nil, "", true
	w.under.errands.run(func() func() {
		photo, err := readPhoto(path)
		return func() {
			if w.closing || w.under.path != path {
				return
			}
			w.under.loading = false
			if err != nil {
				w.under.fault = failure(err)
				w.tellNoUnderlay(path)
			} else {
				w.tookUnderlay(photo)
			}
			w.acted()
		}
	})
}

// tookUnderlay shows a picture that was read.
func (w *window) tookUnderlay(photo *paint.Photo) {
	w.under.photo = photo
	if w.view.fitted {
		w.view.around = w.bounds()
		w.view.resized(w.view.cam.W, w.view.cam.H, w.view.pix)
	}
}

// readPhoto reads and decodes a picture.
func readPhoto(path string) (*paint.Photo, error) {
	if !store.Ends(path) {
		return nil, fmt.Errorf("%s: is a device, not a file; choose a PNG or a JPEG", filepath.Base(path))
	}
	data, err := os.ReadFile(path)
	if err != nil {
		return nil, err
	}
	photo, err := raster.ReadPhoto(data)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", filepath.Base(path), err)
	}
	return photo, nil
}

// tellNoUnderlay says in the strip that the plan's underlay cannot be shown. The plan is open all the same.
func (w *window) tellNoUnderlay(path string) {
	w.notice.offer(sentence("the underlay cannot be shown, it should be at "+path+": "+w.under.fault),
		choice{"Find it…", w.askUnderlay},
		choice{"Take it away", w.removeUnderlay},
		choice{"Close", nil})
}

func (w *window) removeUnderlay() {
	if w.session.Do(plan.Delete{Items: []plan.Ref{theUnderlay}}) == nil {
		w.acted()
	}
}

// underlayOrAsk chooses the plan's underlay, or asks for a picture when it has none.
func (w *window) underlayOrAsk() {
	if w.session.Plan().Sheet().Underlay == nil {
		w.askUnderlay()
		return
	}
	w.takeUnderlay(tool.MoveUnderlay)
}

// askUnderlay asks for a picture and lays it under the plan.
func (w *window) askUnderlay() {
	w.askFile("Lay a picture under the plan", "Lay it under", "", photoSuffix, w.layUnder)
}

// layUnder reads a picture beside the window and lays it under the plan, in the middle of the view; in the place of one that
// is there already.
func (w *window) layUnder(path string) {
	path = absolute(path)
	w.status.hint.set("reading " + filepath.Base(path) + "…")
	w.under.errands.run(func() func() {
		photo, err := readPhoto(path)
		return func() {
			switch {
			case w.closing:
			case err != nil:
				w.notice.show(sentence(failure(err)), "Another picture…", w.askUnderlay)
			default:
				w.laid(path, photo)
			}
		}
	})
}

func (w *window) laid(path string, photo *paint.Photo) {
	w.tool.Stop(w.host)
	u := w.freshUnderlay(photo)
	label := "place underlay"
	if old := w.session.Committed().Sheet().Underlay; old != nil {
		u, label = *old, "replace underlay"
	}
	u.Image = path
	if err := w.session.Do(tool.Named(label, plan.SetUnderlay{Underlay: u})); err != nil {
		w.notice.show(sentence("the picture was not laid under the plan: "+cause(err)), "Another picture…", w.askUnderlay)
		return
	}
	w.under.path, w.under.fault, w.under.loading = path, "", false
	w.notice.hide()
	w.tookUnderlay(photo)
	w.takeUnderlay(tool.MoveUnderlay)
	w.offerCopy()
}

// freshUnderlay fits a picture into the middle of the view, at a scale of two digits.
func (w *window) freshUnderlay(photo *paint.Photo) plan.Underlay {
	cam := w.view.cam
	scale := cam.Scale
	if scale <= 0 {
		scale = 0.05
	}
	size := 0.8 * min(float64(cam.W)/float64(photo.W), float64(cam.H)/float64(photo.H)) / scale
	digit := math.Pow(10, math.Floor(math.Log10(size))-1)
	size = min(max(math.Round(size/digit)*digit, 1e-6), plan.MaxMMPerPixel)
	grid := func(mm float64) int32 { return int32(math.Round(mm * exact.PerMM)) }
	return plan.Underlay{MMPerPixel: size, Opacity: underlayStrength,
		At: exact.Pt{X: grid(cam.CX - size*float64(photo.W)/2), Y: grid(cam.CY - size*float64(photo.H)/2)}}
}

// takeUnderlay chooses the underlay and takes a tool for it in hand.
func (w *window) takeUnderlay(job tool.UnderlayJob) {
	w.choose(0)
	w.session.Select(theUnderlay)
	t := &tool.Underlay{Job: job}
	t.Done = func() {
		t.Job = tool.MoveUnderlay
		w.view.Refresh()
	}
	w.tool = t
	w.view.grab()
	w.acted()
}

// photoSize is the size of the underlay in pixels, nothing when there is no picture.
func (w *window) photoSize() (int, int) {
	if w.under.photo == nil {
		return 0, 0
	}
	return w.under.photo.W, w.under.photo.H
}

// leaveUnderlay puts the underlay's tool away, and reports whether it was in hand.
func (w *window) leaveUnderlay() bool {
	if _, ok := w.tool.(*tool.Underlay); !ok {
		return false
	}
	w.choose(0)
	w.session.Select()
	w.acted()
	return true
}

// offerCopy offers to copy the underlay's picture beside the plan when it lies elsewhere: plans travel, and their pictures
// should with them.
func (w *window) offerCopy() {
	u, path := w.session.Committed().Sheet().Underlay, w.session.Path()
	if u == nil || path == "" || w.under.photo == nil || store.Within(path, u.Image) {
		return
	}
	image := u.Image
	if w.under.offered == [2]string{path, image} {
		return // whoever leaves it there is not asked again at each save
	}
	w.under.offered = [2]string{path, image}
	w.notice.offer(sentence(filepath.Base(image)+" lies outside the folder of the plan, which looks for it there"),
		choice{"Copy it beside the plan", func() { w.copyUnderlay(path, image) }},
		choice{"Leave it there", nil})
}

func (w *window) copyUnderlay(path, image string) {
	w.under.errands.run(func() func() {
		to, err := store.CopyBeside(path, image)
		return func() {
			u := w.session.Committed().Sheet().Underlay
			switch {
			case w.closing || u == nil || u.Image != image:
			case err != nil:
				w.notice.show(sentence("the picture was not copied: "+failure(err)), "Try again", func() { w.copyUnderlay(path, image) })
			default:
				now := *u
				now.Image = to
				w.under.path = to                                                              // it is the same picture
				_ = w.session.Do(tool.Named("copy underlay", plan.SetUnderlay{Underlay: now})) // only its path is another
				w.acted()
			}
		}
	})
}

// sited returns the plan with the path of its underlay changed.
func sited(p *plan.Plan, change func(path string) string) *plan.Plan {
	u := p.Sheet().Underlay
	if u == nil {
		return p
	}
	now := *u
	now.Image = change(u.Image)
	if now.Image == u.Image {
		return p
	}
	next, err := plan.SetUnderlay{Underlay: now}.Apply(p)
	if err != nil { // it names no picture
		return p
	}
	return next
}

// bounds is what a fitted picture shows, in mm: the plan and what is traced.
func (w *window) bounds() orb.Bound {
	p := w.session.Plan()
	b := paint.Bounds(p)
	u := p.Sheet().Underlay
	if u == nil || u.Hidden || w.under.photo == nil || u.Image != w.under.path {
		return b
	}
	for _, c := range paint.UnderlayCorners(u, w.under.photo.W, w.under.photo.H) {
		if b.Max[0] < b.Min[0] {
			b = orb.Bound{Min: c, Max: c}
		}
		b = b.Extend(c)
	}
	return b
}

// hasSuffix reports whether a file's name ends as one of some, written with | between them.
func hasSuffix(name, suffixes string) bool {
	return slices.ContainsFunc(strings.Split(suffixes, "|"), func(s string) bool {
		return strings.HasSuffix(strings.ToLower(name), s)
	})
}
