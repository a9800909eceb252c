// Package study answers the user's questions about a plan: what each observer sees, from where each target is seen, and
// the approach from every start to every target.
//
// Here exact geometry becomes figures and polygons: points are millimetres in float64, areas square metres and lengths
// metres or millimetres as each field says. Polygons that leave the solver are those of github.com/paulmach/orb.
package study
