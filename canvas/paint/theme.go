package paint

import "image/color"

// Theme is the palette of the drawing and of the surround it lies in.
type Theme struct {
	Name string

	Chrome, Panel, Field, FieldBorder, Rule color.NRGBA // the surround
	Ground, Floor                           color.NRGBA // paper outside and inside; Floor is also the halo of labels
	Grid1, Grid5                            color.NRGBA // lines each metre and each five metres; at 60 % on the floor
	LowFill                                 color.NRGBA
	ToolFill, ToolIcon                      color.NRGBA // the selected tool
	Ink, Ink2, Ink3                         color.NRGBA // text, secondary text, hints and ruler ticks
	Poche                                   color.NRGBA // walls and blocks
	Red, Pass, Unknown                      color.NRGBA // walks and faults; a requirement met, and one that cannot be told
	Glazing                                 color.NRGBA
	DeadGround                              color.NRGBA
	Observers                               [4]color.NRGBA
	FirstWash                               color.NRGBA // the first observer's wash; the others wash in their own colour

	WashNear, WashMid, WashFar float64 // strength of the wash at the eye, at 35 % of its reach, and at its end
}

// WashOf returns the colour of an observer's wash.
func (t *Theme) WashOf(colour int) color.NRGBA {
	if colour == 0 {
		return t.FirstWash
	}
	return t.ObserverColour(colour)
}

// ObserverColour returns the colour of an observer by index. Four hues go round; Open tells the second four apart.
func (t *Theme) ObserverColour(colour int) color.NRGBA {
	return t.Observers[(colour%4+4)%4]
}

// Open reports whether an observer of this colour index is drawn as a ring, so that hue never works alone.
func Open(colour int) bool { return (colour%8+8)%8 >= 4 }

func rgb(v uint32) color.NRGBA {
	return color.NRGBA{R: uint8(v >> 16), G: uint8(v >> 8), B: uint8(v), A: 0xFF}
}

// at returns c at a strength from 0 to 1.
func at(c color.NRGBA, strength float64) color.NRGBA {
	c.A = uint8(float64(c.A)*min(max(strength, 0), 1) + 0.5)
	return c
}

// The hues come from Okabe and Ito's palette for all colour visions (2008): blue #0072B2, sky blue #56B4E9, reddish purple
// #CC79A7, bluish green #009E73, orange #E69F00, vermillion #D55E00. Their lightness was moved so that text in them can be
// read and the five stay apart in every colour vision; the spread in lightness carries that and must stay.
var (
	light = Theme{
		Name:   "light",
		Chrome: rgb(0xEDE8DD), Panel: rgb(0xF4F1E9), Field: rgb(0xFFFDF9), FieldBorder: rgb(0x8F8778), Rule: rgb(0xD8D0C1),
		Ground: rgb(0xF7F3EA), Floor: rgb(0xFFFDF8), Grid1: rgb(0xE9E2D4), Grid5: rgb(0xDDD4C3), LowFill: rgb(0xF6F1E6),
		ToolFill: rgb(0x1C2B36), ToolIcon: rgb(0xFFFDF8),
		Ink: rgb(0x1C2B36), Ink2: rgb(0x46535C), Ink3: rgb(0x5D6870), Poche: rgb(0x1C2B36),
		Red: rgb(0xBC4213), Pass: rgb(0x00583F), Unknown: rgb(0x5D6870), Glazing: rgb(0x2F6F8F), DeadGround: rgb(0x7A6A55),
		Observers: [4]color.NRGBA{rgb(0x0072B2), rgb(0x8B5171), rgb(0x00583F), rgb(0x4E3300)},
		FirstWash: rgb(0x0072B2), WashNear: 0.24, WashMid: 0.17, WashFar: 0.10,
	}
	dark = Theme{
		Name:   "dark",
		Chrome: rgb(0x161B20), Panel: rgb(0x1D2329), Field: rgb(0x262D34), FieldBorder: rgb(0x727D87), Rule: rgb(0x333B43),
		Ground: rgb(0x1B2126), Floor: rgb(0x242B32), Grid1: rgb(0x2A3138), Grid5: rgb(0x343C44), LowFill: rgb(0x2C343B),
		ToolFill: rgb(0xECE6D9), ToolIcon: rgb(0x161B20),
		Ink: rgb(0xECE6D9), Ink2: rgb(0xC2BEB3), Ink3: rgb(0xA3A39B), Poche: rgb(0xD2CABA),
		Red: rgb(0xE8703A), Pass: rgb(0x43A681), Unknown: rgb(0xA3A39B), Glazing: rgb(0x8CC3DC), DeadGround: rgb(0xB5A78F),
		Observers: [4]color.NRGBA{rgb(0x91C7EE), rgb(0xD08AB0), rgb(0x43A681), rgb(0xF0CAA4)},
		FirstWash: rgb(0x56B4E9), WashNear: 0.26, WashMid: 0.19, WashFar: 0.11,
	}
)

// Light returns ink on paper.
func Light() *Theme { t := light; return &t }

// Dark returns chalk on slate, with the same weights.
func Dark() *Theme { t := dark; return &t }
