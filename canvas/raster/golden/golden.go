package golden

import (
	"bytes"
	"fmt"
	"image"
	"image/color"
	"image/draw"
	"image/png"
	"os"
	"path/filepath"
	"testing"
)

// A pixel differs when a channel is off by more than far. Sums of floats may fall on the other side of a pixel's border on
// another machine, and such pixels lie scattered: so few in ten thousand of them may differ, and so crowded of a square with a
// side of tile. A mark that has moved or a letter that has changed is more.
const (
	far     = 12
	few     = 5
	tile    = 24
	crowded = 20
)

// Picture compares a picture with the one kept in a file. update writes the file instead.
func Picture(t testing.TB, file string, got *image.RGBA, update bool) {
	t.Helper()
	if update {
		if err := write(file, got); err != nil {
			t.Fatal(err)
		}
		return
	}
	want, err := read(file)
	if err != nil {
		t.Fatalf("%v; -update writes it", err)
	}
	what, marked := Compare(got, want)
	if what == "" {
		return
	}
	name := filepath.Base(file[:len(file)-len(filepath.Ext(file))])
	left := ""
	for part, img := range map[string]*image.RGBA{"got": got, "want": want, "difference": marked} {
		left = filepath.Join(folder(), name+"-"+part+".png")
		if err := write(left, img); err != nil {
			t.Error(err)
		}
	}
	t.Errorf("%s: %s\nlook at %s, with got and want beside it\nwhen it is meant to be so: go test -run '^%s$' -update in this folder",
		name, what, filepath.Join(filepath.Dir(left), name+"-difference.png"), t.Name())
}

// Compare says in words how two pictures visibly differ, empty when they do not, and returns the second one in pale grey with
// the pixels that differ in red.
func Compare(got, want *image.RGBA) (what string, marked *image.RGBA) {
	marked = image.NewRGBA(want.Rect)
	if got.Rect != want.Rect {
		return fmt.Sprintf("is %v, was %v", got.Rect.Size(), want.Rect.Size()), marked
	}
	n, most, at := 0, 0, image.Point{}
	tiles := map[image.Point]int{}
	for y := want.Rect.Min.Y; y < want.Rect.Max.Y; y++ {
		for x := want.Rect.Min.X; x < want.Rect.Max.X; x++ {
			w := want.RGBAAt(x, y)
			grey := uint8(170 + (int(w.R)+int(w.G)+int(w.B))/9)
			c := color.RGBA{grey, grey, grey, 255}
			if apart(got.RGBAAt(x, y), w) {
				c = color.RGBA{220, 0, 0, 255}
				n++
				p := image.Pt(x/tile, y/tile)
				if tiles[p]++; tiles[p] > most {
					most, at = tiles[p], image.Pt(x, y)
				}
			}
			marked.SetRGBA(x, y, c)
		}
	}
	if all := want.Rect.Dx() * want.Rect.Dy(); n*10000 > all*few || most > crowded {
		what = fmt.Sprintf("%d of %d pixels differ, the most of them about %d, %d", n, all, at.X, at.Y)
	}
	return what, marked
}

// apart reports whether two colours differ visibly.
func apart(a, b color.RGBA) bool {
	off := func(p, q uint8) bool { d := int(p) - int(q); return d > far || d < -far }
	return off(a.R, b.R) || off(a.G, b.G) || off(a.B, b.B)
}

// folder is out/golden at the top of the repository, or under the folder for temporary files where that is not found.
func folder() string {
	dir, err := os.Getwd()
	for err == nil && dir != filepath.Dir(dir) {
		if _, err := os.Stat(filepath.Join(dir, "go.mod")); err == nil {
			return filepath.Join(dir, "out", "golden")
		}
		dir = filepath.Dir(dir)
	}
	return filepath.Join(os.TempDir(), "enfilade-golden")
}

func read(file string) (*image.RGBA, error) {
	b, err := os.ReadFile(file)
	if err != nil {
		return nil, err
	}
	kept, err := png.Decode(bytes.NewReader(b))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", file, err)
	}
	img := image.NewRGBA(kept.Bounds())
	draw.Draw(img, img.Rect, kept, img.Rect.Min, draw.Src)
	return img, nil
}

func write(file string, img *image.RGBA) error {
	var b bytes.Buffer
	if err := (&png.Encoder{CompressionLevel: png.BestCompression}).Encode(&b, img); err != nil {
		return fmt.Errorf("%s: %w", file, err)
	}
	if err := os.MkdirAll(filepath.Dir(file), 0o777); err != nil {
		return err
	}
	return os.WriteFile(file, b.Bytes(), 0o666)
}
