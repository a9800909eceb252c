// Package view maps the plan's grid to pixels and back, and chooses what a ruler shows.
//
// The plan has x right and y up, in grid units of 0.1 mm; a picture has x right and y down, in device pixels. Sizes that
// keep their size at every zoom (line weights, glyphs, text) are given in px at 100 %, and a [Camera] carries how many
// device pixels one such px has. This is the only place where grid numbers become floats for display; nothing here
// decides a geometric question.
package view
