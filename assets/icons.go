package assets

import (
	"bytes"
	"embed"
	"slices"
	"strings"
)

//go:embed icons/*.svg icons/app.png
var iconFiles embed.FS

// Icon returns the named icon as an SVG of 20 by 20, all of it filled black, so that a theme can recolour it by its fill.
// The names are those of Icons; another name is a caller's bug.
func Icon(name string) []byte { return mustRead(iconFiles, "icons/"+name+".svg") }

// IconIn returns the named icon filled with another colour, written as SVG writes it: "#BC4213".
func IconIn(name, colour string) []byte {
	return bytes.ReplaceAll(Icon(name), []byte("#000000"), []byte(colour))
}

// Icons lists the names of the icons, sorted, without the program's own.
func Icons() []string {
	entries, err := iconFiles.ReadDir("icons")
	if err != nil {
		panic("assets: " + err.Error())
	}
	var names []string
	for _, e := range entries {
		if name, ok := strings.CutSuffix(e.Name(), ".svg"); ok && name != "app" {
			names = append(names, name)
		}
	}
	slices.Sort(names)
	return names
}

// AppIcon returns the program's icon as a PNG of 256 by 256: three nested doorways and a red point.
func AppIcon() []byte { return mustRead(iconFiles, "icons/app.png") }

// AppIconSVG returns the program's icon as an SVG.
func AppIconSVG() []byte { return mustRead(iconFiles, "icons/app.svg") }
