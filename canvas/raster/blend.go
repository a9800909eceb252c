package raster

import (
	"encoding/binary"
	"image/color"
)

// Pixels are blended two at a time in 64-bit words: their red and blue in one, sixteen bits apart, their green and alpha in
// another. A strength runs from 0 to 256 there, so that both ends are exact and no lane overflows: 255·256 + 128 < 2^16.

// pairs is an opaque colour, twice, in such words.
type pairs struct{ rb, ga uint64 }

const (
	lanes = 0x00FF00FF00FF00FF
	half  = 0x0080008000800080
)

func pairsOf(c color.NRGBA) pairs {
	const twice = 1 | 1<<32
	return pairs{(uint64(c.R) | uint64(c.B)<<16) * twice, (uint64(c.G) | 255<<16) * twice}
}

// at returns the colour times a strength from 0 to 256, with what rounds to nearest.
func (c pairs) at(a uint64) pairs { return pairs{c.rb*a + half, c.ga*a + half} }

// full turns a strength from 0 to 255 into one from 0 to 256.
func full(a uint32) uint64 { return uint64(a + a>>7) }

// over lays a colour, made by at, over two pixels; n is 256 less its strength.
func (c pairs) over(v, n uint64) uint64 {
	return ((v&lanes)*n+c.rb)>>8&lanes | ((v>>8&lanes)*n+c.ga)&(lanes<<8)
}

// one lays the colour over the pixel at the beginning of q at a strength from 0 to 256.
func (c pairs) one(q []uint8, a uint64) {
	v := uint64(binary.LittleEndian.Uint32(q))
	binary.LittleEndian.PutUint32(q, uint32(c.at(a).over(v, 256-a)))
}

// eight lays a colour, made by at, over the eight pixels at the beginning of q.
func (c pairs) eight(q []uint8, n uint64) {
	q = q[:32:32]
	binary.LittleEndian.PutUint64(q[0:], c.over(binary.LittleEndian.Uint64(q[0:]), n))
	binary.LittleEndian.PutUint64(q[8:], c.over(binary.LittleEndian.Uint64(q[8:]), n))
	binary.LittleEndian.PutUint64(q[16:], c.over(binary.LittleEndian.Uint64(q[16:]), n))
	binary.LittleEndian.PutUint64(q[24:], c.over(binary.LittleEndian.Uint64(q[24:]), n))
}

// plainSpan blends one colour at one strength.
func (p *painter) plainSpan(y, x0, x1 int, cover uint32) {
	a := full(scale(cover, p.a))
	pix := p.pix[(y*p.w+x0)*4 : (y*p.w+x1)*4]
	c, n := p.pairs.at(a), 256-a
	for ; len(pix) >= 32; pix = pix[32:] {
		c.eight(pix, n)
	}
	for ; len(pix) >= 4; pix = pix[4:] {
		v := uint64(binary.LittleEndian.Uint32(pix))
		binary.LittleEndian.PutUint32(pix, uint32(c.over(v, n)))
	}
}

// maskedSpan blends one colour, less where ink lies over it or the clip lets less through. Eight pixels without ink that
// are wholly inside or wholly outside of the clip go at once.
func (p *painter) maskedSpan(y, x0, x1 int, cover uint32) {
	a := scale(cover, p.a)
	from, to := y*p.w+x0, y*p.w+x1
	pix := p.pix[from*4 : to*4]
	var under, clip []uint8
	if p.under != nil {
		under = p.under[from:to]
	}
	if p.clip != nil {
		clip = p.clip[from:to]
	}
	f := full(a)
	c, n := p.pairs.at(f), 256-f
	if p.inkColour != nil && clip == nil {
		p.underInk(pix, under, f)
		return
	}
	for i := 0; i < to-from; {
		if i+8 <= to-from {
			u, k := word(under, i, 0), word(clip, i, ^uint64(0))
			if k == 0 || u == ^uint64(0) {
				i += 8
				continue
			}
			if k == ^uint64(0) && u == 0 {
				c.eight(pix[i*4:], n)
				i += 8
				continue
			}
		}
		for end := min(i+8, to-from); i < end; i++ {
			s := a
			if clip != nil {
				s = scale(s, uint32(clip[i]))
			}
			if under != nil {
				s = scale(s, 255-uint32(under[i]))
			}
			if s != 0 {
				p.pairs.one(pix[i*4:i*4+4], full(s))
			}
		}
	}
}

// underInk blends one colour under ink of a known colour. Where ink covers a share m of a pixel, the pixel shows
// m·ink + (1-m)·below; laying the colour on what is below with a strength is the same as moving the whole pixel with that
// strength towards m·ink + (1-m)·colour. Taking (1-m) of the strength instead would leave a seam of floor along walls.
func (p *painter) underInk(pix, under []uint8, strength uint64) {
	c, n := p.pairs.at(strength), 256-strength
	for i, u := range under {
		q := pix[i*4 : i*4+4]
		switch u {
		case 255:
		case 0:
			v := uint64(binary.LittleEndian.Uint32(q))
			binary.LittleEndian.PutUint32(q, uint32(c.over(v, n)))
		default:
			m := full(uint32(u))
			mixed := p.inkColour.at(m).over(p.pairs.rb|p.pairs.ga<<8, 256-m)
			t := pairs{mixed & lanes, mixed >> 8 & lanes}
			t.one(q, strength)
		}
	}
}

// word returns eight bytes of a mask from i on, or what stands for no mask.
func word(m []uint8, i int, none uint64) uint64 {
	if m == nil {
		return none
	}
	return binary.LittleEndian.Uint64(m[i : i+8])
}

// putCover writes the same coverage all along.
func putCover(m []uint8, cover uint8) {
	const each = 0x0101010101010101
	for v := uint64(cover) * each; len(m) >= 8; m = m[8:] {
		binary.LittleEndian.PutUint64(m, v)
	}
	for i := range m {
		m[i] = cover
	}
}
