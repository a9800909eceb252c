// Package store saves files so that a file is always either the old one or the new one, whole: whatever fails, and whenever the
// program or the machine stops. It knows bytes, not plans.
//
// The new text is written to a temporary file in the same folder, forced to disk, given the old file's permissions, and
// renamed over it; then the folder is forced to disk. A renaming within a folder is atomic by POSIX (rename, IEEE Std
// 1003.1).
//
// A [Shelter] keeps copies of work that no file holds yet, and finds those that a program left behind when it was killed.
// A [Print] tells whether another program has changed a file.
package store
