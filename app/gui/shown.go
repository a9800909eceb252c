package gui

import (
	"slices"

	"github.com/paulmach/orb"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
	"enfilade/canvas/paint"
	"enfilade/canvas/pick"
	"enfilade/canvas/view"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
)

// prefHidden keeps the layers that are switched off, so that one that comes with a later version is on.
const prefHidden = "layers.off"

// shown is what of the study is drawn.
type shown struct {
	without paint.Layers
	regions []string // observers whose regions' borders are drawn beside the chosen one's
	choice  paint.WalkChoice
	walks   []paint.Walk // those of paint.WalksPicked
}

// layerNames are the layers that can be switched, in the order of the menu.
var layerNames = []struct {
	layer paint.Layers
	name  string
}{
	{paint.LayerRegions, "Sight regions"}, {paint.LayerApproaches, "Approaches"}, {paint.LayerFullWalks, "Full walks"},
	{paint.LayerSightLines, "Sight lines"}, {paint.LayerLabels, "Labels"}, {paint.LayerRulers, "Rulers"},
	{paint.LayerGrid, "Grid"}, {paint.LayerUnderlay, "Underlay"},
}

// layerMenu switches each layer of the picture.
func (w *window) layerMenu() []command {
	list := []command{{label: "Shown", rule: true}}
	for _, l := range layerNames {
		list = append(list, command{label: l.name, inner: true, checked: !w.shown.without.Has(l.layer), do: func() { w.switchLayer(l.layer) }})
	}
	p := w.session.Plan()
	return append(list, command{label: "Regions and walks…", do: w.askShown, dead: p.NumObservers()+p.NumStarts()*p.NumTargets() == 0})
}

// switchLayer shows a layer or leaves it out, and remembers it.
func (w *window) switchLayer(l paint.Layers) {
	w.shown.without ^= l
	w.app.Preferences().SetInt(prefHidden, int(w.shown.without))
	w.acted()
}

// showLayers puts into a scene what is to be drawn.
func (w *window) showLayers(s *paint.Scene) {
	s.Without, s.Regions, s.WalkChoice, s.Walks = w.shown.without, w.shown.regions, w.shown.choice, w.shown.walks
}

// askShown asks which regions and which walks are drawn beside the chosen ones.
func (w *window) askShown() {
	p := w.session.Plan()
	regions, walks := pile(), pile()
	var eyes, ways []*checkRow
	var ids []string
	var pairs []paint.Walk
	for i, o := range p.Observers() {
		on := w.results.all || slices.Contains(w.shown.regions, o.ID)
		title := observerLetter(i) // as in the picture
		if o.Name != "" {
			title += " · " + o.Name
		}
		eyes, ids = append(eyes, newCheckRow(title, on)), append(ids, o.ID)
		regions.Add(eyes[len(eyes)-1])
	}
	for _, s := range p.Starts() {
		for _, t := range p.Targets() {
			walk := paint.Walk{Start: s.ID, Target: t.ID}
			ways, pairs = append(ways, newCheckRow(startName(p, s.ID)+" → "+targetName(p, t.ID), w.walkShown(walk))), append(pairs, walk)
			walks.Add(ways[len(ways)-1])
		}
	}
	column := func(title, none string, rows []*checkRow, list *fyne.Container) fyne.CanvasObject {
		if len(rows) == 0 {
			list.Add(caption(none))
		}
		all := func(on bool) func() {
			return func() {
				for _, r := range rows {
					r.set(on)
				}
			}
		}
		foot := inset(0, 8, 0, 0, container.NewHBox(newPushButton("All", all(true)), newPushButton("None", all(false))))
		scroll := container.NewThemeOverride(container.NewVScroll(inset(4, 4, 10, 4, list)), tightLook{w})
		return around(inset(0, 0, 0, 4, newText(title, assets.Semibold, 12.5, roleInk)), foot, nil, nil, scroll)
	}
	page := container.NewGridWithColumns(2,
		column("Borders of regions", "There is no observer yet.", eyes, regions),
		column("Walks", "There is no start and target yet.", ways, walks))
	w.ask("Shown beside what is chosen", container.New(minHeight(300), page), 620,
		choice{"Show these", func() { w.setShown(picked(eyes, ids), len(ids), picked(ways, pairs), len(pairs)) }}, choice{"Cancel", nil})
}

// walkShown reports whether a walk is drawn beside the chosen one, or would be if another were chosen.
func (w *window) walkShown(walk paint.Walk) bool {
	switch w.shown.choice {
	case paint.WalksNone:
		return false
	case paint.WalksPicked:
		return slices.Contains(w.shown.walks, walk)
	}
	return walk.Target == w.results.target
}

func picked[T any](rows []*checkRow, of []T) (some []T) {
	for i, r := range rows {
		if r.on {
			some = append(some, of[i])
		}
	}
	return some
}

// setShown takes over which of so many regions and walks are drawn.
func (w *window) setShown(regions []string, observers int, walks []paint.Walk, pairs int) {
	w.results.all = observers > 0 && len(regions) == observers
	w.shown.regions = regions
	w.shown.choice, w.shown.walks = paint.WalksPicked, walks
	if len(walks) == 0 && pairs > 0 {
		w.shown.choice = paint.WalksNone
	}
	w.acted()
}

// fitSelection shows what is selected, or the whole plan when nothing is.
func (w *window) fitSelection() {
	b, ok := w.selectionBounds()
	if !ok {
		w.view.fit()
		return
	}
	w.view.fitted = false
	w.view.glide.to(w.view.cam, view.Fit(b, w.view.cam.W, w.view.cam.H, w.view.cam.K), w.view.see)
}

// aroundMark is how much of the plan is shown about a mark that is fitted into the view, in mm.
const aroundMark = 1500

// selectionBounds returns the box around what is selected, in mm.
func (w *window) selectionBounds() (b orb.Bound, ok bool) {
	p := w.session.Plan()
	add := func(q orb.Point, by float64) {
		box := orb.Bound{Min: q, Max: q}.Pad(by)
		if ok {
			box = b.Union(box)
		}
		b, ok = box, true
	}
	mm := func(q exact.Pt) orb.Point { return orb.Point{float64(q.X) / exact.PerMM, float64(q.Y) / exact.PerMM} }
	for _, r := range w.session.Selection() {
		if u := p.Sheet().Underlay; r.Kind == plan.KindUnderlay && u != nil && w.under.photo != nil {
			for _, c := range paint.UnderlayCorners(u, w.under.photo.W, w.under.photo.H) {
				add(c, 0)
			}
			continue
		}
		around := 300.0
		if r.Kind == plan.KindObserver || r.Kind == plan.KindTarget || r.Kind == plan.KindStart || r.Kind == plan.KindOpening {
			around = aroundMark
		}
		if o, found := p.Opening(r.ID); found && r.Kind == plan.KindOpening {
			r = plan.Ref{Kind: plan.KindWall, ID: o.Wall}
		}
		if points, found := pick.Points(p, r); found {
			for _, q := range points.All() {
				add(mm(q), around)
			}
		}
	}
	return b, ok
}
