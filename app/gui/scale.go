package gui

import (
	"os"
	"strconv"

	"fyne.io/fyne/v2"
)

// scaleEnv is where the toolkit looks for how large to draw; its own settings are those of every program that uses it, and not
// this one's to change.
const scaleEnv = "FYNE_SCALE"

// scales are the sizes that the menu offers; the toolkit rounds to tenths.
var scales = []float64{1, 1.2, 1.5, 2}

// startScale makes the toolkit draw as large as was chosen, unless the environment says how.
func startScale(p fyne.Preferences) {
	if s := p.Float(prefScale); s > 0 && os.Getenv(scaleEnv) == "" {
		putScale(s)
	}
}

func putScale(s float64) {
	os.Setenv(scaleEnv, strconv.FormatFloat(s, 'g', -1, 64))
}

// scaleNow is how large the toolkit draws.
func scaleNow() float64 {
	if s, err := strconv.ParseFloat(os.Getenv(scaleEnv), 64); err == nil && s > 0 {
		return s
	}
	return 1
}

// setScale draws everything larger or smaller, remembers it, and keeps the windows as large as they are.
func (w *window) setScale(s float64) {
	share := float32(scaleNow() / s)
	putScale(s)
	w.app.Preferences().SetFloat(prefScale, s)
	sizes := map[*window]fyne.Size{}
	for _, v := range w.desk.windows {
		sizes[v] = v.win.Canvas().Size()
	}
	w.desk.rescale()
	w.do(func() {
		for v, size := range sizes {
			if !v.closing {
				v.win.Resize(fyne.NewSize(size.Width*share, size.Height*share))
			}
		}
	})
}

// scaleMenu offers how large everything is drawn.
func (w *window) scaleMenu() []command {
	list := []command{{label: "Size", rule: true}}
	for _, s := range scales {
		list = append(list, command{label: strconv.Itoa(int(s*100+0.5)) + " %", inner: true, do: func() { w.setScale(s) }, checked: s == scaleNow()})
	}
	return list
}

// toggleStill lets things move by themselves, or not.
func (w *window) toggleStill() {
	p := w.app.Preferences()
	p.SetBool(prefStill, !p.Bool(prefStill))
}
