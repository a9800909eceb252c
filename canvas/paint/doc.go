// Package paint turns a plan, what was studied about it, and a style into a display list: fills, strokes, hatches, washes
// and lines of text, back to front, in device pixels, without making a pixel.
//
// [Base] lists what changes seldom (paper, grid, floor, bodies), [Overlay] what may change every frame (the sight region,
// walks, marks, labels, rulers). Both hold places as float32, good to 1/200 px on the largest picture, after everything
// outside the picture was cut off in float64. Sizes in this package are px at 100 % unless said otherwise; a list has
// them multiplied by the camera's K.
//
// Labels are placed by rank at one of eight places about their mark, free of marks, routes, ink and earlier labels; a
// reused [List] remembers the places, so that labels do not flicker while something is dragged.
package paint
