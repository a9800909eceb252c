// Package app is the home of the program: the open plan, the background solver, the window and the command line; its code
// lives one level down. Its own test holds the import directions and the rules of style that a machine can check.
package app
