//go:build ignore

// Benchtable reads what `go test -bench` printed, ours and CGAL's, and prints them side by side: medians over the rounds,
// how many times as fast ours is, allocations, and how each grows from the smallest plan to the largest.
package main

import (
	"bufio"
	"fmt"
	"os"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"text/tabwriter"
)

// rows are what is compared: our benchmark and CGAL's, each with the unit that counts. CGAL's walks cost the same wherever
// they lead, so one figure stands beside our median and our mean.
var rows = []struct{ title, ours, unit, theirs, theirUnit string }{
	{"graph and mesh", "Build", "ns/op", "CGALBuild", "ns/op"},
	{"one region, median", "Region", "median-ns", "CGALRegion", "median-ns"},
	{"one region, mean", "Region", "ns/op", "CGALRegion", "ns/op"},
	{"one approach, median", "Approach", "median-ns", "CGALWalk", "ns/op"},
	{"one approach, mean", "Approach", "ns/op", "CGALWalk", "ns/op"},
	{"one full walk, median", "FullWalk", "median-ns", "CGALWalk", "ns/op"},
	{"one full walk, mean", "FullWalk", "ns/op", "CGALWalk", "ns/op"},
	{"10 starts x 50 targets", "AllApproaches", "ns/op", "", ""},
}

// key names one figure: benchmark, plan, walls, unit.
type key struct {
	bench, plan string
	walls       int
	unit        string
}

var line = regexp.MustCompile(`^Benchmark(\w+)/plan=(\w+)/walls=(\d+)(?:-\d+)?\s+\d+\s+(.*)$`)

func main() {
	if len(os.Args) != 2 {
		fmt.Fprintln(os.Stderr, "benchtable: name the file with the figures")
		os.Exit(2)
	}
	file, err := os.Open(os.Args[1])
	if err != nil {
		fmt.Fprintln(os.Stderr, "benchtable:", err)
		os.Exit(1)
	}
	defer file.Close()
	figures := map[key][]float64{}
	for in := bufio.NewScanner(file); in.Scan(); {
		read(in.Text(), figures)
	}
	print(figures)
}

// read adds the figures of one line.
func read(text string, figures map[key][]float64) {
	m := line.FindStringSubmatch(text)
	if m == nil {
		return
	}
	walls, _ := strconv.Atoi(m[3])
	words := strings.Fields(m[4])
	for i := 0; i+1 < len(words); i += 2 {
		if v, err := strconv.ParseFloat(words[i], 64); err == nil {
			k := key{m[1], m[2], walls, words[i+1]}
			figures[k] = append(figures[k], v)
		}
	}
}

func median(list []float64) (float64, bool) {
	if len(list) == 0 {
		return 0, false
	}
	list = slices.Sorted(slices.Values(list))
	return list[len(list)/2], true
}

func print(figures map[key][]float64) {
	out := tabwriter.NewWriter(os.Stdout, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(out, "what\tplan\twalls\tours\tCGAL\ttimes as fast\tallocations\tbytes\tns/triangle\tfloods of all floor\tours, growth\tCGAL, growth\t")
	for _, r := range rows {
		first := map[string]key{}
		for _, k := range sizes(figures, r.ours, r.unit) {
			if _, ok := first[k.plan]; !ok {
				first[k.plan] = k
			}
			mine := cell{figures, key{r.ours, k.plan, k.walls, r.unit}}
			yours := cell{figures, key{r.theirs, k.plan, k.walls, r.theirUnit}}
			base := first[k.plan]
			fmt.Fprintf(out, "%s\t%s\t%d\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t\n", r.title, k.plan, k.walls, mine.time(), yours.time(),
				over(yours, mine), mine.at("allocs/op").number(), mine.at("B/op").number(), mine.at("ns/triangle").number(), mine.at("floods").number(),
				over(mine, mine.size(base.walls)), over(yours, yours.size(base.walls)))
		}
	}
	out.Flush()
}

// sizes returns the plans a benchmark ran on, by plan and size.
func sizes(figures map[key][]float64, bench, unit string) []key {
	var list []key
	for k := range figures {
		if k.bench == bench && k.unit == unit {
			list = append(list, k)
		}
	}
	order := []string{"office", "clutter", "comb", "maze"}
	slices.SortFunc(list, func(a, b key) int {
		if c := slices.Index(order, a.plan) - slices.Index(order, b.plan); c != 0 {
			return c
		}
		return a.walls - b.walls
	})
	return list
}

// cell is one figure that may be missing.
type cell struct {
	figures map[key][]float64
	key
}

func (c cell) value() (float64, bool) { return median(c.figures[c.key]) }

func (c cell) at(unit string) cell {
	c.unit = unit
	return c
}

func (c cell) size(walls int) cell {
	c.walls = walls
	return c
}

func (c cell) time() string {
	v, ok := c.value()
	switch {
	case !ok:
		return "-"
	case v < 1e3:
		return fmt.Sprintf("%.0f ns", v)
	case v < 1e6:
		return fmt.Sprintf("%.3g us", v/1e3)
	default:
		return fmt.Sprintf("%.4g ms", v/1e6)
	}
}

func (c cell) number() string {
	if v, ok := c.value(); ok {
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	return "-"
}

// over returns how many times b goes into a.
func over(a, b cell) string {
	x, okX := a.value()
	y, okY := b.value()
	if !okX || !okY || y == 0 {
		return "-"
	}
	return fmt.Sprintf("%.3g", x/y)
}
