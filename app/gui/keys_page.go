package gui

import (
	"strings"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/container"

	"enfilade/assets"
)

// keyGroup is one part of the page of keys: what to press, and what it does.
type keyGroup struct {
	title string
	rows  [][2]string
}

// keyGroups are the parts of the page of keys. The letters of the tools come from the tools themselves.
func keyGroups(unit string) []keyGroup {
	return []keyGroup{
		{"Tools", toolRows()},
		{"While drawing", [][2]string{
			{"digits", "type a length, a width or a radius at the pointer"},
			{"Tab", "the other field: angle, height, distance from the corner"},
			{"Enter", "put what is typed; else end the run"},
			{"Backspace, Ctrl+Z", "take the last corner back"},
			{"double click, Esc", "end the run; the first corner closes it"},
			{"Shift", "eight directions, squares; a plain gap"},
			{"arrows, Space", "move the pointer, and click there: all without a mouse"},
			{"Ctrl", "nothing snaps; the Snap menu switches each kind"},
			{"J", "the other side: of a wall's body, a door, a target's wall"},
			{"H", "walls: thin or thick; doors: hinges at the other jamb"},
			{"K, U", "doors: the leaf; open or shut"},
		}},
		{"Selecting", [][2]string{
			{"click again", "what lies below"},
			{"Shift and click", "add, or take out"},
			{"drag a box", "what lies inside; with Ctrl also what it touches"},
			{"N, Shift+N", "the next item, the one before"},
			{"Ctrl+A, Ctrl+Shift+A", "all, or all of the same kind"},
			{"arrows", nudgeRow(unit)},
			{"H, J, K, U", "selected doors: hinges, side, leaf, open or shut"},
			{"J", "selected walls: body centred, left, right; targets: other face"},
			{"Shift while turning", "steps of 15°"},
		}},
		{"Changing", [][2]string{
			{"Ctrl+Z, Ctrl+Shift+Z", "undo, redo"}, {"Delete", "take the selection away"},
			{"Ctrl+X, Ctrl+C, Ctrl+V", "cut, copy, paste; also into another window"},
			{"Ctrl+D", "duplicate; with Shift in rows"},
			{"Ctrl+R, Ctrl+M", "rotate, mirror: typed, or by clicks in the plan"},
			{"Ctrl+L, Ctrl+H", "lock, hide; with Shift unlock, show everything"},
		}},
		{"Looking", [][2]string{
			{"wheel, + and −", "zoom at the pointer"}, {"0, Home", "fit the plan"}, {"9", "fit the selection"},
			{"middle button, Space", "drag to pan"},
		}},
		{"Files and menus", [][2]string{
			{"Ctrl+S, Ctrl+O, Ctrl+N", "save, open, new"}, {"Alt, F10", "the menus"},
			{"Esc", "the select tool; a long study stops"},
		}},
	}
}

// nudgeRow tells how far the arrow keys nudge in a plan of a display unit.
func nudgeRow(unit string) string {
	if unit == "ft" {
		return "nudge by 1 in, with Shift 1 ft, with Ctrl ½ in"
	}
	return "nudge by 0.1 m, with Shift 1 m, with Ctrl 1 cm"
}

// toolRows tells the letters of the tools, with the shapes that a letter goes through.
func toolRows() (rows [][2]string) {
	for i, k := range tools {
		if k.letter == "" {
			continue
		}
		name := strings.ToLower(k.name)
		if shapeOf(i) == i {
			rows = append(rows, [2]string{k.letter, name})
			continue
		}
		rows[len(rows)-1][1] += "; again: " + name
	}
	return rows
}

// showKeys shows the page of keys, in two columns where there is room.
func (w *window) showKeys() {
	columns := []*fyne.Container{pile(), pile()}
	size := w.win.Canvas().Size()
	wide := size.Width >= 1000
	if !wide {
		columns = columns[:1]
	}
	for i, g := range keyGroups(w.unit()) {
		c := columns[0]
		if wide && i > 1 {
			c = columns[1]
		}
		above := float32(14)
		if len(c.Objects) == 0 {
			above = 0
		}
		c.Add(inset(0, above, 0, 3, newText(g.title, assets.Bold, 12.5, roleInk)))
		c.Add(inset(0, 0, 0, 3, hairline()))
		for _, r := range g.rows {
			key := fixed(146, newText(r[0], assets.Semibold, 12, roleInk))
			c.Add(inset(0, 1, 0, 2, container.NewHBox(key, newText(r[1], assets.Regular, 12, roleInk2))))
		}
	}
	row := container.NewHBox(columns[0])
	if wide {
		row.Add(inset(28, 0, 0, 0, columns[1]))
	}
	scroll := container.NewVScroll(row)
	least := row.MinSize()
	scroll.SetMinSize(fyne.NewSize(least.Width+10, min(least.Height, size.Height-190)))
	w.ask("Keys", scroll, least.Width+54, choice{"Close", nil})
}
