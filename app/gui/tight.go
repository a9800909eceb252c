package gui

import (
	"image/color"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"
)

// colour is a colour without its alpha multiplied in.
type colour = color.NRGBA

// tightLook is the window's look for forms and tables: no shadows, smaller text.
type tightLook struct{ w *window }

// Color is for the toolkit.
func (t tightLook) Color(n fyne.ThemeColorName, v fyne.ThemeVariant) color.Color {
	if n == theme.ColorNameShadow { // what can be scrolled casts none
		return colour{}
	}
	return t.w.look.Color(n, v)
}

// Font is for the toolkit.
func (t tightLook) Font(s fyne.TextStyle) fyne.Resource { return t.w.look.Font(s) }

// Icon is for the toolkit.
func (t tightLook) Icon(n fyne.ThemeIconName) fyne.Resource { return t.w.look.Icon(n) }

// Size is for the toolkit; what is typed is as large as what stands beside it.
func (t tightLook) Size(n fyne.ThemeSizeName) float32 {
	if n == theme.SizeNameText {
		return 12.5
	}
	return t.w.look.Size(n)
}
