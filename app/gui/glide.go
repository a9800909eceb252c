package gui

import (
	"math"
	"time"

	"fyne.io/fyne/v2"

	"enfilade/canvas/view"
)

// glideTime is how long zooming and fitting take; nothing else in the window moves by itself.
const glideTime = 120 * time.Millisecond

// still reports whether nothing is to move by itself: the user or the desktop wants no animations.
func still() bool {
	a := fyne.CurrentApp()
	return a.Preferences().Bool(prefStill) || !a.Settings().ShowAnimations()
}

// glide moves the camera from where it is to another one. It takes the goal at once where nothing is to move by itself.
type glide struct {
	goal view.Camera
	run  *fyne.Animation // nil when the camera is at rest
}

// to begins a glide; show is told each camera on the way, the last one being the goal itself.
func (g *glide) to(from, goal view.Camera, show func(view.Camera)) {
	g.stop()
	if still() || from.W != goal.W || from.H != goal.H || from.K != goal.K || from.Scale <= 0 {
		show(goal)
		return
	}
	g.goal = goal
	a := fyne.NewAnimation(glideTime, nil)
	a.Curve = fyne.AnimationEaseOut
	a.Tick = func(p float32) {
		if g.run != a {
			return // another glide has begun
		}
		if p >= 1 {
			g.run = nil
			show(goal)
			return
		}
		show(between(from, goal, float64(p)))
	}
	g.run = a
	a.Start()
}

// from returns the camera that a further move starts from: the goal while gliding.
func (g *glide) from(now view.Camera) view.Camera {
	if g.run != nil {
		return g.goal
	}
	return now
}

func (g *glide) stop() {
	if g.run != nil {
		g.run.Stop()
		g.run = nil
	}
}

// between returns the camera a share of the way from a to b. The scale goes in equal ratios. A point that has the same place
// in both pictures keeps it on the way: its distance from the centre is a constant over the scale, so the centre goes
// evenly in 1/scale.
func between(a, b view.Camera, p float64) view.Camera {
	c := a
	t := p
	if a.Scale != b.Scale {
		c.Scale = a.Scale * math.Pow(b.Scale/a.Scale, p)
		t = (1/c.Scale - 1/a.Scale) / (1/b.Scale - 1/a.Scale)
	}
	c.CX, c.CY = a.CX+(b.CX-a.CX)*t, a.CY+(b.CY-a.CY)*t
	return c
}
