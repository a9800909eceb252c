// Package fileio is the home of all that is read from and written to files: plans and reports; its code lives one level
// down.
package fileio
