package gui

import "fyne.io/fyne/v2"

// Where the size of the window that was closed last is remembered, in px at 100 %.
const (
	prefWidth  = "window.width"
	prefHeight = "window.height"
)

// usualSize is how large a window opens where nothing says otherwise, in px at 100 %; titleBar is what a display that is too
// small for it keeps free for the window's title.
var usualSize = fyne.NewSize(1440, 900)

const titleBar = 36

// openSize returns how large a window opens, in px at 100 %: as it was left, or the usual size; but no larger than the room on
// the display, in the display's own px, of which scale make one at 100 %. A display without a size says nothing.
func openSize(left, room fyne.Size, scale float32) fyne.Size {
	size := usualSize
	if left.Width > 0 && left.Height > 0 {
		size = left
	}
	if room.Width <= 0 || room.Height <= 0 || scale <= 0 {
		return size
	}
	if most := room.Width / scale; size.Width > most {
		size.Width = most
	}
	if most := room.Height / scale; size.Height > most {
		size.Height = most - titleBar
	}
	return size
}

// sizeFor returns how large another window opens at a scale of the toolkit.
func (d *desk) sizeFor(scale float32) fyne.Size {
	if d.size.Width > 0 { // it was asked for
		return d.size
	}
	p := d.parts.app.Preferences()
	var room fyne.Size
	if d.parts.room != nil {
		room.Width, room.Height = d.parts.room()
	}
	return openSize(fyne.NewSize(float32(p.Float(prefWidth)), float32(p.Float(prefHeight))), room, scale)
}

// resize gives a window that opens its size, and does so again when the toolkit draws larger than thought: only a window that is
// shown knows it.
func (d *desk) resize(w *window) {
	guess := float32(scaleNow())
	w.win.Resize(d.sizeFor(guess))
	w.do(func() {
		if scale := w.win.Canvas().Scale(); !w.closing && scale > guess {
			w.win.Resize(d.sizeFor(scale))
		}
	})
}

// keepSize remembers how large the window is for the next that opens.
func (w *window) keepSize() {
	size, p := w.win.Canvas().Size(), w.app.Preferences()
	if size.Width > 0 && size.Height > 0 {
		p.SetFloat(prefWidth, float64(size.Width))
		p.SetFloat(prefHeight, float64(size.Height))
	}
}
