package gui

import (
	"image/color"
	"os"
	"runtime"

	"fyne.io/fyne/v2"
	"fyne.io/fyne/v2/theme"

	"enfilade/assets"
	"enfilade/canvas/paint"
)

// The choices of View > Theme.
const (
	themeSystem = "system"
	themeLight  = "light"
	themeDark   = "dark"
)

// look is the toolkit's theme: ink on paper, without colour.
type look struct {
	choice string // themeSystem, themeLight or themeDark
	silent bool   // the system has not said which it wants; what the toolkit then takes it to want does not count
}

// dark reports whether the look is the dark one when the system asks for the given variant.
func (l *look) dark(v fyne.ThemeVariant) bool {
	switch l.choice {
	case themeLight:
		return false
	case themeDark:
		return true
	}
	return v == theme.VariantDark && !l.silent
}

// systemIsSilent reports whether the system may have no say in how windows look: elsewhere than on a free Unix desktop it always
// has one, and there the environment may speak for it.
func systemIsSilent() bool {
	switch runtime.GOOS {
	case "windows", "darwin":
		return false
	}
	return os.Getenv("FYNE_THEME") == ""
}

// hearSystem takes note when the system says which look it wants: a change of the toolkit's settings that is not the desk's own.
func (d *desk) hearSystem() {
	d.parts.app.Settings().AddListener(func(fyne.Settings) {
		if d.setting {
			return
		}
		d.parts.do(func() {
			if d.look.silent {
				d.setLook(look{choice: d.look.choice})
			}
		})
	})
}

// Color returns the colour of a part of the toolkit's widgets.
func (l *look) Color(name fyne.ThemeColorName, v fyne.ThemeVariant) color.Color {
	p := paletteOf(l.dark(v))
	switch name {
	case theme.ColorNameBackground, theme.ColorNameHeaderBackground, theme.ColorNameInnerWindowBorder,
		theme.ColorNameInnerWindowBorderInactive:
		return p.Chrome
	case theme.ColorNameInputBackground:
		return p.Field
	case theme.ColorNameInputBorder:
		return p.FieldBorder
	case theme.ColorNameMenuBackground, theme.ColorNameOverlayBackground:
		return p.Panel
	case theme.ColorNameForeground, theme.ColorNamePrimary, theme.ColorNameHyperlink,
		theme.ColorNameWarning:
		return p.Ink
	case theme.ColorNameForegroundOnPrimary, theme.ColorNameForegroundOnError, theme.ColorNameForegroundOnSuccess,
		theme.ColorNameForegroundOnWarning:
		return p.ToolIcon
	case theme.ColorNamePlaceHolder, theme.ColorNameDisabled:
		return p.Ink3
	case theme.ColorNameSeparator, theme.ColorNameDisabledButton:
		return p.Rule
	case theme.ColorNameButton:
		return p.Field
	case theme.ColorNameHover:
		return faded(p.Ink, 7)
	case theme.ColorNamePressed:
		return faded(p.Ink, 13)
	case theme.ColorNameSelection, theme.ColorNameFocus: // the toolkit lays its focus under text of the same ink
		return faded(p.Ink, 16)
	case theme.ColorNameScrollBar:
		return faded(p.Ink, 28)
	case theme.ColorNameScrollBarBackground:
		return color.NRGBA{}
	case theme.ColorNameShadow:
		return color.NRGBA{A: 51}
	case theme.ColorNameError:
		return p.Red
	case theme.ColorNameSuccess:
		return p.Pass
	}
	return theme.DefaultTheme().Color(name, v)
}

// Size returns a measure of the toolkit's widgets, in px at 100 %.
func (l *look) Size(name fyne.ThemeSizeName) float32 {
	switch name {
	case theme.SizeNameText:
		return 13
	case theme.SizeNameCaptionText:
		return 11.5
	case theme.SizeNameSubHeadingText:
		return 14
	case theme.SizeNameHeadingText:
		return 18
	case theme.SizeNamePadding:
		return 4
	case theme.SizeNameInnerPadding: // an entry of a form is 27 px high
		return 5.5
	case theme.SizeNameScrollBar:
		return 6
	case theme.SizeNameScrollBarSmall: // at rest; a field whose text is too long for it has one too
		return 2
	case theme.SizeNameInputRadius, theme.SizeNameSelectionRadius, theme.SizeNameButtonRadius, theme.SizeNameMenuRadius,
		theme.SizeNamePopupRadius, theme.SizeNameDialogRadius, theme.SizeNameCardRadius:
		return 4
	case theme.SizeNameScrollBarRadius:
		return 3
	case theme.SizeNameSplitThickness, theme.SizeNameSeparatorThickness, theme.SizeNameInputBorder:
		return 1
	case theme.SizeNameInlineIcon:
		return 16
	case theme.SizeNameModalBlurRadius:
		return 0
	}
	return theme.DefaultTheme().Size(name)
}

// Font returns Lato, and the toolkit's own fonts for what Lato is not: fixed width and signs.
func (l *look) Font(s fyne.TextStyle) fyne.Resource {
	switch {
	case s.Monospace || s.Symbol:
		return theme.DefaultTheme().Font(s)
	case s.Bold:
		return fontOf(assets.Bold)
	}
	return fontOf(assets.Regular)
}

// Icon returns the toolkit's icons, recoloured by it.
func (l *look) Icon(name fyne.ThemeIconName) fyne.Resource { return theme.DefaultTheme().Icon(name) }

// fonts are the embedded fonts as the toolkit wants them: one resource each, for it caches by identity.
var fonts = func() (f [assets.Bold + 1]fyne.Resource) {
	for w := range f {
		f[w] = fyne.NewStaticResource(assets.FontName(assets.Weight(w)), assets.FontFile(assets.Weight(w)))
	}
	return f
}()

func fontOf(w assets.Weight) fyne.Resource { return fonts[w] }

// themed returns the palette in force.
func themed() *paint.Theme { return paletteOf(isDark()) }

// isDark reports whether the look in force is the dark one.
func isDark() bool {
	s := fyne.CurrentApp().Settings()
	if l, ok := s.Theme().(*look); ok {
		return l.dark(s.ThemeVariant())
	}
	return s.ThemeVariant() == theme.VariantDark
}
