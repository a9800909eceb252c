package raster

import (
	"bytes"
	"errors"
	"fmt"
	"image"
	_ "image/jpeg" // what an underlay may be
	_ "image/png"
	"math"

	"golang.org/x/image/draw"
	"golang.org/x/image/math/f64"

	"enfilade/canvas/paint"
)

// MaxPhoto is how many pixels a photo may have: it takes four bytes for each, and a third more for its smaller levels.
const MaxPhoto = 64_000_000

// ReadPhoto decodes a PNG or JPEG, and turns one upright that says how the camera was held. It may run on any goroutine.
//
//   - Errors say what is wrong and what would be right: it is neither, it is damaged, or it is too large.
func ReadPhoto(data []byte) (*paint.Photo, error) {
	size, kind, err := image.DecodeConfig(bytes.NewReader(data))
	switch {
	case errors.Is(err, image.ErrFormat):
		return nil, errors.New("is neither a PNG nor a JPEG; save it as one of these")
	case err != nil:
		return nil, fmt.Errorf("cannot be read as a picture: %w", err)
	case size.Width*size.Height > MaxPhoto:
		return nil, fmt.Errorf("has %d × %d pixels; make it smaller, up to %d million pixels", size.Width, size.Height, MaxPhoto/1_000_000)
	}
	img, _, err := image.Decode(bytes.NewReader(data))
	if err != nil {
		return nil, fmt.Errorf("is a damaged %s: %w", kind, err)
	}
	return makePhoto(img, orientation(data)), nil
}

// leastLevel is the width or height below which a photo is not halved any more.
const leastLevel = 64

// NewPhoto makes a picture ready to be drawn at any zoom.
func NewPhoto(img image.Image) *paint.Photo { return makePhoto(img, 1) }

// makePhoto is NewPhoto of a picture that was held in one of the eight ways.
func makePhoto(img image.Image, held int) *paint.Photo {
	b := img.Bounds()
	full := image.NewRGBA(image.Rect(0, 0, b.Dx(), b.Dy()))
	draw.Draw(full, full.Rect, img, b.Min, draw.Src)
	full = upright(full, held)
	p := &paint.Photo{W: full.Rect.Dx(), H: full.Rect.Dy(), Levels: []*image.RGBA{full}}
	last := full
	for last.Rect.Dx() > leastLevel && last.Rect.Dy() > leastLevel {
		last = halved(last)
		p.Levels = append(p.Levels, last)
	}
	p.Light = mostlyLight(last)
	return p
}

// halved returns a picture half as large, each pixel the mean of four. An odd last row or column counts twice.
func halved(src *image.RGBA) *image.RGBA {
	w, h := src.Rect.Dx(), src.Rect.Dy()
	dst := image.NewRGBA(image.Rect(0, 0, (w+1)/2, (h+1)/2))
	for y := range dst.Rect.Dy() {
		r0 := src.Pix[2*y*src.Stride:]
		r1 := src.Pix[min(2*y+1, h-1)*src.Stride:]
		out := dst.Pix[y*dst.Stride : (y+1)*dst.Stride]
		for x := range dst.Rect.Dx() {
			i, j := 8*x, 4*min(2*x+1, w-1)
			for c := range 4 {
				out[4*x+c] = uint8((int(r0[i+c]) + int(r0[j+c]) + int(r1[i+c]) + int(r1[j+c]) + 2) / 4)
			}
		}
	}
	return dst
}

// mostlyLight reports whether a picture is more light than dark.
func mostlyLight(img *image.RGBA) bool {
	sum := 0
	for i := 0; i < len(img.Pix); i += 4 {
		sum += 299*int(img.Pix[i]) + 587*int(img.Pix[i+1]) + 114*int(img.Pix[i+2])
	}
	return sum > len(img.Pix)/4*1000*255/2
}

// photo draws a photo in its place: the level whose pixels come nearest from below to those of the device, bilinear.
func (d *baseDrawer) photo(op *paint.Op) {
	s := d.l.Images[op.Style]
	m := s.Place
	size := math.Sqrt(math.Abs(m[0]*m[4] - m[1]*m[3])) // device pixels in one of the photo's
	level := 0
	for level+1 < len(s.Photo.Levels) && size*float64(int(2)<<level) <= 1 {
		level++
	}
	src := s.Photo.Levels[level]
	kx, ky := float64(s.Photo.W)/float64(src.Rect.Dx()), float64(s.Photo.H)/float64(src.Rect.Dy())
	place := f64.Aff3{m[0] * kx, m[1] * ky, m[2], m[3] * kx, m[4] * ky, m[5]}
	tile := image.NewRGBA(d.Image.Rect)
	draw.ApproxBiLinear.Transform(tile, place, src, src.Rect, draw.Src, nil)
	blendPhoto(d.Image.Pix, tile.Pix, int(s.Strength*256+0.5), s.Inverse)
}

// blendPhoto lays a picture with its own alpha over opaque pixels at a strength from 0 to 256.
func blendPhoto(dst, src []uint8, strength int, inverse bool) {
	for i := 0; i+3 < len(src) && i+3 < len(dst); i += 4 {
		a := int(src[i+3])
		if a == 0 {
			continue
		}
		r, g, b := int(src[i]), int(src[i+1]), int(src[i+2])
		if inverse { // c + (1 - max - min): the lightness of HSL turned round, hue and saturation as they are
			turn := a - max(r, g, b) - min(r, g, b)
			r, g, b = r+turn, g+turn, b+turn
		}
		dst[i] = over(dst[i], r, a, strength)
		dst[i+1] = over(dst[i+1], g, a, strength)
		dst[i+2] = over(dst[i+2], b, a, strength)
	}
}

// over lays a premultiplied channel c of alpha a over d.
func over(d uint8, c, a, strength int) uint8 {
	v := int(d)
	return uint8(v + ((c-v*a/255)*strength+128)>>8)
}
