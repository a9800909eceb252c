// Package raster draws a display list of canvas/paint to an image.
//
// A picture has two layers. [NewBase] draws the base once, on any goroutine: an opaque image, and beside it two masks
// that say how much ink lies on each pixel. [Frame.Draw] copies the base and blends the overlay into it span by span;
// where the list says that a step lies under ink, its coverage is multiplied by what the ink leaves free, so that walls
// stay on top without a second layer. It makes no allocation once its buffers have grown.
//
// Shapes are filled by gg's rasteriser (golang/freetype/raster) with a span painter of our own; the large fills of a base
// go through golang.org/x/image/vector in one pass, and its plain lines through gg. Letters are rasterised once for each
// size and quarter of a pixel, and kept.
package raster
