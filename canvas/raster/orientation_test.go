package raster_test

import (
	"bytes"
	"encoding/binary"
	"fmt"
	"image"
	"image/color"
	"image/jpeg"
	"testing"

	"enfilade/canvas/raster"
)

// seenPicture is 48 by 32 pixels, each quarter of another grey, so that no turn and no mirror leaves it as it is.
func seenPicture() *image.Gray {
	img := image.NewGray(image.Rect(0, 0, 48, 32))
	for y := range 32 {
		for x := range 48 {
			img.SetGray(x, y, color.Gray{Y: [4]uint8{20, 90, 160, 230}[y/16*2+x/24]})
		}
	}
	return img
}

// held returns the picture as a camera stores it: the first row and the first column lie on these sides of the seen one.
func held(seen *image.Gray, row, column string) *image.Gray {
	w, h := seen.Rect.Dx(), seen.Rect.Dy()
	rows, columns := h, w
	if row == "left" || row == "right" {
		rows, columns = w, h
	}
	out := image.NewGray(image.Rect(0, 0, columns, rows))
	for r := range rows {
		for c := range columns {
			x, y := 0, 0
			put := func(side string, n int) {
				switch side {
				case "top":
					y = n
				case "bottom":
					y = h - 1 - n
				case "left":
					x = n
				case "right":
					x = w - 1 - n
				}
			}
			put(row, r)
			put(column, c)
			out.SetGray(c, r, seen.GrayAt(x, y))
		}
	}
	return out
}

// exif is an APP1 segment with a directory of three tags, the orientation in their midst.
func exif(order binary.AppendByteOrder, value uint16) []byte {
	tiff := []byte("II*\x00")
	if order.String() == binary.BigEndian.String() {
		tiff = []byte("MM\x00*")
	}
	tiff = order.AppendUint32(tiff, 8)
	tiff = order.AppendUint16(tiff, 3)
	for _, e := range [][2]uint16{{0x0100, 48}, {0x0112, value}, {0x011A, 7}} {
		tiff = order.AppendUint16(tiff, e[0])
		tiff = order.AppendUint16(tiff, 3)
		tiff = order.AppendUint32(tiff, 1)
		tiff = order.AppendUint16(tiff, e[1])
		tiff = order.AppendUint16(tiff, 0)
	}
	tiff = order.AppendUint32(tiff, 0)
	body := append([]byte("Exif\x00\x00"), tiff...)
	return append(binary.BigEndian.AppendUint16([]byte{0xFF, 0xE1}, uint16(len(body)+2)), body...)
}

// withSegments is a JPEG with segments put in after its start.
func withSegments(t *testing.T, img image.Image, segments ...[]byte) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := jpeg.Encode(&b, img, &jpeg.Options{Quality: 95}); err != nil {
		t.Fatal(err)
	}
	out := append([]byte{}, b.Bytes()[:2]...)
	for _, s := range segments {
		out = append(out, s...)
	}
	return append(out, b.Bytes()[2:]...)
}

// greys returns the greys in the middles of a photo's quarters, row by row, to the nearest of the four that were drawn.
func greys(t *testing.T, data []byte) string {
	t.Helper()
	p, err := raster.ReadPhoto(data)
	if err != nil {
		t.Fatal(err)
	}
	out := fmt.Sprintf("%d by %d:", p.W, p.H)
	for _, q := range [4][2]int{{1, 1}, {3, 1}, {1, 3}, {3, 3}} {
		out += fmt.Sprint(" ", (int(p.Levels[0].RGBAAt(q[0]*p.W/4, q[1]*p.H/4).R)-20+35)/70)
	}
	return out
}

func TestAPhotoIsTurnedUpright(t *testing.T) {
	app0 := []byte{0xFF, 0xE0, 0, 4, 1, 2}
	for value, sides := range [9][2]string{1: {"top", "left"}, 2: {"top", "right"}, 3: {"bottom", "right"}, 4: {"bottom", "left"},
		5: {"left", "top"}, 6: {"right", "top"}, 7: {"right", "bottom"}, 8: {"left", "bottom"}} {
		if value == 0 {
			continue
		}
		for _, order := range []binary.AppendByteOrder{binary.LittleEndian, binary.BigEndian} {
			data := withSegments(t, held(seenPicture(), sides[0], sides[1]), app0, []byte{0xFF}, exif(order, uint16(value)))
			if got, want := greys(t, data), "48 by 32: 0 1 2 3"; got != want {
				t.Errorf("orientation %d, %v: %s, want %s", value, order, got, want)
			}
		}
	}
}

func TestAPhotoThatDoesNotSayHowItWasHeldStaysAsItIs(t *testing.T) {
	segment := func(body string) []byte {
		return append(binary.BigEndian.AppendUint16([]byte{0xFF, 0xE1}, uint16(len(body)+2)), body...)
	}
	long := exif(binary.LittleEndian, 6)
	for name, s := range map[string][]byte{
		"no Exif at all":              {},
		"a value of 0":                exif(binary.LittleEndian, 0),
		"a value of 9":                exif(binary.BigEndian, 9),
		"another APP1":                segment("http://ns.adobe.com/xap/1.0/\x00II*\x00"),
		"nothing after the name":      segment("Exif\x00\x00"),
		"neither order of bytes":      segment("Exif\x00\x00IM*\x00\x08\x00\x00\x00"),
		"a directory beyond the end":  segment("Exif\x00\x00II*\x00\xF0\xFF\xFF\xFF"),
		"a directory that is cut off": segment(string(long[4 : len(long)-30])),
		"a directory without it":      segment("Exif\x00\x00II*\x00\x08\x00\x00\x00\x00\x00"),
	} {
		if got, want := greys(t, withSegments(t, seenPicture(), s)), "48 by 32: 0 1 2 3"; got != want {
			t.Errorf("%s: %s, want %s", name, got, want)
		}
	}
	// A number of another kind is not read.
	wrong := exif(binary.LittleEndian, 6)
	i := bytes.Index(wrong, []byte{0x12, 0x01, 3, 0})
	wrong[i+2] = 4
	if got := greys(t, withSegments(t, seenPicture(), wrong)); got != "48 by 32: 0 1 2 3" {
		t.Errorf("a tag of another type: %s", got)
	}
}
