package raster

import (
	"bytes"
	"encoding/binary"
	"image"
)

// orientation returns how a JPEG says its pixels were held, 1 to 8 as in the tag 0x0112 of the Exif standard (CIPA DC-008,
// section 4.6.5); 1, upright, where it says nothing that can be read.
func orientation(jpeg []byte) int {
	const start, scan, app1 = 0xD8, 0xDA, 0xE1
	if len(jpeg) < 2 || jpeg[0] != 0xFF || jpeg[1] != start {
		return 1
	}
	for rest := jpeg[2:]; len(rest) >= 4 && rest[0] == 0xFF; {
		marker := rest[1]
		if marker == 0xFF { // filling before a marker
			rest = rest[1:]
			continue
		}
		size := int(binary.BigEndian.Uint16(rest[2:])) // of the segment with these two bytes
		if marker == scan || size < 2 || 2+size > len(rest) {
			return 1
		}
		if body, ok := bytes.CutPrefix(rest[4:2+size], []byte("Exif\x00\x00")); ok && marker == app1 {
			return tiffOrientation(body)
		}
		rest = rest[2+size:]
	}
	return 1
}

// tiffOrientation looks for the tag in the first directory of a TIFF structure.
func tiffOrientation(tiff []byte) int {
	const tag, short, entry = 0x0112, 3, 12
	var order binary.ByteOrder
	switch {
	case bytes.HasPrefix(tiff, []byte("II*\x00")):
		order = binary.LittleEndian
	case bytes.HasPrefix(tiff, []byte("MM\x00*")):
		order = binary.BigEndian
	default:
		return 1
	}
	if len(tiff) < 8 {
		return 1
	}
	at := uint64(order.Uint32(tiff[4:]))
	if at+2 > uint64(len(tiff)) {
		return 1
	}
	dir := tiff[at+2:]
	for range order.Uint16(tiff[at:]) {
		if len(dir) < entry {
			return 1
		}
		if order.Uint16(dir) == tag {
			if v := int(order.Uint16(dir[8:])); order.Uint16(dir[2:]) == short && order.Uint32(dir[4:]) == 1 && v >= 1 && v <= 8 {
				return v
			}
			return 1
		}
		dir = dir[entry:]
	}
	return 1
}

// upright returns a picture turned and mirrored from how it was held to how it is to be seen; src itself when it was held
// upright. Its rectangle begins at 0, 0.
func upright(src *image.RGBA, held int) *image.RGBA {
	// Of a pixel to be seen in column x and row y: where it was held. The standard tells the sides of the seen picture on
	// which the first row and the first column were held.
	w, h := src.Rect.Dx(), src.Rect.Dy()
	var from func(x, y int) (int, int)
	switch held {
	case 2: // top, right
		from = func(x, y int) (int, int) { return w - 1 - x, y }
	case 3: // bottom, right
		from = func(x, y int) (int, int) { return w - 1 - x, h - 1 - y }
	case 4: // bottom, left
		from = func(x, y int) (int, int) { return x, h - 1 - y }
	case 5: // left, top
		from = func(x, y int) (int, int) { return y, x }
	case 6: // right, top
		from = func(x, y int) (int, int) { return y, h - 1 - x }
	case 7: // right, bottom
		from = func(x, y int) (int, int) { return w - 1 - y, h - 1 - x }
	case 8: // left, bottom
		from = func(x, y int) (int, int) { return w - 1 - y, x }
	default:
		return src
	}
	seen := image.Rect(0, 0, w, h)
	if held > 4 {
		seen = image.Rect(0, 0, h, w)
	}
	dst := image.NewRGBA(seen)
	for y := range seen.Dy() {
		row := dst.Pix[y*dst.Stride:]
		for x := range seen.Dx() {
			i, j := from(x, y)
			copy(row[4*x:4*x+4], src.Pix[j*src.Stride+4*i:])
		}
	}
	return dst
}
