package gui

import (
	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
	"enfilade/canvas/tool"
	"enfilade/solver/plan"
)

// toolKind is one tool of the rail.
type toolKind struct {
	name   string // for the menus, as in "Wall"
	icon   string
	letter string // the key that chooses it; the select tool has none, Escape leads back to it
	tip    string
	group  string
	make   func() tool.Tool
}

// tools are the tools in the rail's order; the first is the one Escape leads back to. Tools that follow each other with the
// same letter are shapes of one thing: they share a button, and the letter goes from one to the next.
var tools = []toolKind{
	{"Select", "select", "", "Select and move (Esc)", "Inspect", func() tool.Tool { return &tool.Select{} }},
	{"Measure", "measure", "M", "Measure distances, angles and areas", "Inspect", func() tool.Tool { return &tool.Measure{} }},
	{"Wall", "wall", "W", "Draw walls corner by corner", "Draw", func() tool.Tool { return &tool.Chain{Kind: plan.Solid} }},
	{"Room", "room", "R", "Draw a room: a rectangle of walls", "Draw", func() tool.Tool { return &tool.Rect{Kind: plan.KindWall} }},
	{"Door or gap", "door", "D", "Cut a door or a gap into a wall", "Draw", func() tool.Tool { return &tool.Door{} }},
	{"Glazing", "glazing", "G", "Draw glazing: it stops walking, not sight", "Draw", func() tool.Tool { return &tool.Chain{Kind: plan.Glazing} }},
	{"Screen", "screen", "S", "Draw a screen: it stops sight, not walking", "Draw", func() tool.Tool { return &tool.Chain{Kind: plan.Screen} }},
	{"Low wall", "low", "L", "Draw a low wall: it stops walking, and sight up to its height", "Draw", func() tool.Tool { return &tool.Chain{Kind: plan.Low} }},
	{"Column", "block", "C", "Put down a column; C again draws a block, and again one of any outline", "Draw", func() tool.Tool { return &tool.Round{} }},
	{"Block", "box", "C", "Draw a block, a level rectangle", "Draw", func() tool.Tool { return &tool.Rect{Kind: plan.KindBlock} }},
	{"Block of any outline", "outline", "C", "Draw a block corner by corner", "Draw", func() tool.Tool { return &tool.Chain{Ring: plan.KindBlock} }},
	{"Zone", "zone", "Z", "Name an area; Z again draws one of any outline", "Draw", func() tool.Tool { return &tool.Rect{Kind: plan.KindZone} }},
	{"Zone of any outline", "zone", "Z", "Name an area, corner by corner", "Draw", func() tool.Tool { return &tool.Chain{Ring: plan.KindZone} }},
	{"Floor", "floor", "F", "Draw the floor's outline; F again draws a rectangle", "Draw", func() tool.Tool { return &tool.Chain{Ring: plan.KindFloor} }},
	{"Floor, a rectangle", "floor", "F", "Draw the floor as a rectangle", "Draw", func() tool.Tool { return &tool.Rect{Kind: plan.KindFloor} }},
	{"Observer", "observer", "O", "Put down an observer", "Place", func() tool.Tool { return &tool.Mark{Kind: plan.KindObserver} }},
	{"Target", "target", "T", "Put down a target: a thing to be seen", "Place", func() tool.Tool { return &tool.Mark{Kind: plan.KindTarget} }},
	{"Start", "start", "B", "Put down a start: where a walk begins", "Place", func() tool.Tool { return &tool.Mark{Kind: plan.KindStart} }},
	{"Route", "waypoint", "P", "Draw a route: a start, waypoints, a target", "Place", func() tool.Tool { return &tool.Route{} }},
}

// shapeOf returns the first of the tools that tool i is a shape of.
func shapeOf(i int) int {
	for i > 0 && tools[i].letter != "" && tools[i-1].letter == tools[i].letter {
		i--
	}
	return i
}

// nextShape returns the tool after i among the shapes of one thing, round and round; i itself where there is but one.
func nextShape(i int) int {
	if i+1 < len(tools) && shapeOf(i+1) == shapeOf(i) {
		return i + 1
	}
	return shapeOf(i)
}

// asked returns the tool that the letter or the button of tool i means: the next shape when one of its shapes is in hand.
func (w *window) asked(i int) int {
	if shapeOf(w.toolAt) == shapeOf(i) {
		return nextShape(w.toolAt)
	}
	return i
}

// newRail lays the tools' buttons out in groups, each named and parted from the next by a hairline. It returns a button for
// each tool; shapes of one thing have the same.
func newRail(t *tips, choose func(i int)) (*fyne.Container, []*toolButton) {
	var buttons []*toolButton
	var objects []fyne.CanvasObject
	group := ""
	for i, k := range tools {
		if first := shapeOf(i); first != i {
			buttons = append(buttons, buttons[first])
			continue
		}
		if k.group != group {
			if group != "" {
				objects = append(objects, hairline())
			}
			group = k.group
			name := newText(group, assets.Regular, 10.5, roleInk2)
			name.align = fyne.TextAlignCenter
			objects = append(objects, name)
		}
		b := newToolButton(k.icon, k.letter, k.tip, t, func() { choose(i) })
		buttons = append(buttons, b)
		objects = append(objects, b)
	}
	return on(roleChrome, container.New(railLayout{}, objects...)), buttons
}

// railLayout stacks the rail: it is 54 px wide and a button's pitch is 40.
type railLayout struct{}

const railWidth = 54

// MinSize is for the toolkit. In a very low window the rail is cut off below: its tools are in the menus too.
func (railLayout) MinSize([]fyne.CanvasObject) fyne.Size { return fyne.NewSize(railWidth, 0) }

// Layout is for the toolkit.
func (railLayout) Layout(objects []fyne.CanvasObject, s fyne.Size) {
	pitch, names := railPitch(s.Height)
	y := float32(8)
	for _, o := range objects {
		switch w := o.(type) {
		case *inkText:
			if w.Hidden = !names; names {
				w.Move(fyne.NewPos(0, y))
				w.Resize(fyne.NewSize(s.Width, 16))
				y += 20
			}
		case *paper:
			w.Move(fyne.NewPos((s.Width-24)/2, y+4))
			w.Resize(fyne.NewSize(24, 1))
			y += 11
		default:
			w.Move(fyne.NewPos((s.Width-toolWidth)/2, y))
			w.Resize(fyne.NewSize(toolWidth, min(toolHeight, pitch-2)))
			y += pitch
		}
	}
}

// railPitch is the pitch of the buttons of a rail, and whether the groups have their names: in a low window the buttons come closer
// together, and then the names go.
func railPitch(height float32) (pitch float32, names bool) {
	n, groups := float32(0), float32(0)
	for i, k := range tools {
		if shapeOf(i) == i {
			n++
		}
		if i == 0 || tools[i-1].group != k.group {
			groups++
		}
	}
	rules := 8 + (groups-1)*11
	if pitch = (height - rules - groups*20) / n; pitch >= 28 {
		return min(pitch, 40), true
	}
	return min(max((height-rules)/n, 22), 40), false
}
