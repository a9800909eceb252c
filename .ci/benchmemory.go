//go:build ignore

// Benchmemory writes seeded offices to a folder, has the program study them and prints the most memory that each study held
// at once: resident, by the system's count.
//
//	go run .ci/benchmemory.go FOLDER PROGRAM WALLS
package main

import (
	"bytes"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"syscall"
	"time"

	"enfilade/fileio/planfile"
	"enfilade/solver/exact"
	"enfilade/solver/plan"
	"enfilade/solver/plantest"
)

// radii are the walkers' radii in mm.
var radii = []int32{0, 250}

func main() {
	if err := run(os.Args[1:]); err != nil {
		fmt.Fprintln(os.Stderr, "benchmemory:", err)
		os.Exit(1)
	}
}

func run(args []string) error {
	if len(args) != 3 {
		return fmt.Errorf("name a folder, the program and a number of walls")
	}
	walls, err := strconv.Atoi(args[2])
	if err != nil {
		return err
	}
	for _, radius := range radii {
		parts := plantest.Office(1, walls).Parts()
		parts.Walker.Radius = radius * exact.PerMM
		path := filepath.Join(args[0], fmt.Sprintf("office-%d-%d.json", walls, radius))
		var text bytes.Buffer
		if err := planfile.Write(&text, plan.From(parts)); err != nil {
			return err
		}
		if err := os.WriteFile(path, text.Bytes(), 0o644); err != nil {
			return err
		}
		cmd := exec.Command(args[1], "study", path)
		var complaint bytes.Buffer
		cmd.Stderr = &complaint
		began := time.Now()
		why := ""
		if err := cmd.Run(); err != nil {
			if cmd.ProcessState == nil {
				return err
			}
			why = ", when it gave up: " + strings.TrimSpace(complaint.String())
		}
		peak := cmd.ProcessState.SysUsage().(*syscall.Rusage).Maxrss // in KiB on Linux
		fmt.Printf("peak memory of study, %d walls, radius %d mm: %d MB, in %.1f s%s\n", walls, radius, peak*1024/1e6,
			time.Since(began).Seconds(), why)
	}
	return nil
}
