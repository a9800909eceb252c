// Package assets embeds what the program carries with it: the Lato fonts, its icons, and the sample plans.
//
// It knows the files and what can be measured of them (the width of a line of text), not what they are used for.
package assets
