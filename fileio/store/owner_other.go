//go:build !unix

package store

import (
	"io/fs"
	"os"
)

// keepOwner does nothing where files have no owner in this sense.
func keepOwner(*os.File, fs.FileInfo) {}
