package paint

import (
	"image/color"

	"enfilade/assets"
)

// textLook is how a line of text is written; sizes are px at 100 %.
type textLook struct {
	size, spacing, halo float64
	weight              assets.Weight
	colour              color.NRGBA
	up                  bool
	onGround            bool // outside the floor: the halo is of the ground's colour
}

// width returns the width of a run of letters in device pixels.
func (p *pen) width(t text, look textLook) float64 {
	return assets.FaceOf(look.weight).Width(p.Chars[t[0]:t[1]], look.size*p.k, look.spacing*p.k)
}

// put writes a run of letters with its base line beginning at (x, y), in device pixels.
func (p *pen) put(t text, x, y float64, look textLook) {
	if t[0] == t[1] {
		return
	}
	k := float32(p.k)
	halo := p.theme.Floor
	if look.onGround {
		halo = p.theme.Ground
	}
	p.Texts = append(p.Texts, TextStyle{
		Chars: t, At: Pt{float32(x), float32(y)}, Size: float32(look.size) * k, Weight: look.weight,
		Spacing: float32(look.spacing) * k, Halo: float32(look.halo) * k, Up: look.up, HaloColour: halo,
	})
	p.Ops = append(p.Ops, Op{Kind: Text, Colour: look.colour, Style: int32(len(p.Texts) - 1)})
}

// centred writes a run of letters with the middle of its base line at (x, y).
func (p *pen) centred(t text, x, y float64, look textLook) {
	half := p.width(t, look) / 2
	if look.up {
		p.put(t, x, y+half, look)
	} else {
		p.put(t, x-half, y, look)
	}
}
