package gui

import (
	"fmt"
	"image/color"

	"enfilade/canvas/paint"
)

// The two palettes; nothing changes them.
var light, dark = paint.Light(), paint.Dark()

func paletteOf(isDark bool) *paint.Theme {
	if isDark {
		return dark
	}
	return light
}

// faded returns c at so many per cent.
func faded(c color.NRGBA, percent int) color.NRGBA {
	c.A = uint8((int(c.A)*percent + 50) / 100)
	return c
}

// svgColour writes c as SVG does, without its alpha.
func svgColour(c color.NRGBA) string { return fmt.Sprintf("#%02X%02X%02X", c.R, c.G, c.B) }

// A role picks one colour of whichever palette is in force.
type role func(*paint.Theme) color.NRGBA

func roleChrome(p *paint.Theme) color.NRGBA   { return p.Chrome }
func rolePanel(p *paint.Theme) color.NRGBA    { return p.Panel }
func roleField(p *paint.Theme) color.NRGBA    { return p.Field }
func roleRule(p *paint.Theme) color.NRGBA     { return p.Rule }
func roleInk(p *paint.Theme) color.NRGBA      { return p.Ink }
func roleInk2(p *paint.Theme) color.NRGBA     { return p.Ink2 }
func roleInk3(p *paint.Theme) color.NRGBA     { return p.Ink3 }
func roleRed(p *paint.Theme) color.NRGBA      { return p.Red }
func roleToolIcon(p *paint.Theme) color.NRGBA { return p.ToolIcon }
