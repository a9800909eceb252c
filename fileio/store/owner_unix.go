//go:build unix

package store

import (
	"io/fs"
	"os"
	"syscall"
)

// keepOwner gives a file the owner and group of the old one. Only the superuser may give files away, so for others it does
// nothing but keep a group they belong to; failing is no fault.
func keepOwner(f *os.File, old fs.FileInfo) {
	stat, ok := old.Sys().(*syscall.Stat_t)
	if !ok {
		return
	}
	if f.Chown(int(stat.Uid), int(stat.Gid)) != nil {
		_ = f.Chown(-1, int(stat.Gid))
	}
}
