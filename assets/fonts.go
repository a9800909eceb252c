package assets

import (
	"embed"
	"fmt"
	"sync"

	"golang.org/x/image/font/sfnt"
)

//go:embed fonts/*.ttf fonts/OFL.txt
var fontFiles embed.FS

// Weight is one of the weights of the Lato family that are embedded.
type Weight uint8

// The weights, lightest first.
const (
	Light Weight = iota
	Regular
	Medium
	Semibold
	Bold
	numWeights
)

// String returns the weight's name as the font files spell it.
func (w Weight) String() string {
	return [...]string{"Light", "Regular", "Medium", "Semibold", "Bold"}[w]
}

// FontName returns the file name of a weight, "Lato-Regular.ttf" for one.
func FontName(w Weight) string { return "Lato-" + w.String() + ".ttf" }

// FontFile returns a weight as a TrueType file. The caller must not change it.
func FontFile(w Weight) []byte { return mustRead(fontFiles, "fonts/"+FontName(w)) }

// FontLicence returns the text of the fonts' licence, the SIL Open Font License 1.1.
func FontLicence() string { return string(mustRead(fontFiles, "fonts/OFL.txt")) }

// FaceOf returns the face of a weight. It is parsed at first use and may be used by several goroutines at once.
func FaceOf(w Weight) *Face { return faces[w]() }

var faces = func() (f [numWeights]func() *Face) {
	for w := range f {
		f[w] = sync.OnceValue(func() *Face {
			font, err := sfnt.Parse(FontFile(Weight(w)))
			if err != nil {
				panic(fmt.Sprintf("assets: %s: %v", FontName(Weight(w)), err))
			}
			return newFace(font)
		})
	}
	return f
}()

func mustRead(fs embed.FS, name string) []byte {
	b, err := fs.ReadFile(name)
	if err != nil {
		panic("assets: " + err.Error())
	}
	return b
}
