// Package verbs is the command line: what is said after the program's name, and what that does. Opening the window is one
// of its verbs, handed in by the program, so that the rest needs neither a display nor a C compiler.
//
// Results go to standard output. Errors go to standard error as "enfilade: FILE: WHERE: what is wrong and what would be
// right". The exit code is 0 when the thing asked for was done, whatever it found, and 2 when it could not be.
package verbs
