package gui

import (
	"bytes"

	"fyne.io/fyne/v2"
)

// themedIcon is an icon in the ink of the look in force, for the toolkit's own widgets.
type themedIcon struct{ fyne.Resource }

// Name is another one in each look, for the toolkit caches pictures by name.
func (t themedIcon) Name() string { return svgColour(themed().Ink) + t.Resource.Name() }

// Content returns the icon in the ink of the look.
func (t themedIcon) Content() []byte {
	return bytes.ReplaceAll(t.Resource.Content(), []byte("#000000"), []byte(svgColour(themed().Ink)))
}
