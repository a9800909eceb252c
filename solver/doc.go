// Package solver is the home of the exact geometry, the plan model and the studies; its code lives one level down.
package solver
