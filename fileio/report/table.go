package report

import (
	"strings"
	"unicode/utf8"
)

// column is a column of a table: its heading, and whether it holds numbers, which are set to the right.
type column struct {
	head  string
	right bool
}

// table lays out rows in columns as wide as their widest cell. A row may be shorter than the table; its last cell then runs
// on over the columns that it has no cells for and widens none.
type table struct {
	columns []column
	rows    [][]string
}

func (t *table) add(cells ...string) { t.rows = append(t.rows, cells) }

// write appends the heading and the rows, each after an indent of two spaces, without spaces at line ends.
func (t *table) write(b *strings.Builder) {
	heads := make([]string, len(t.columns))
	for i, c := range t.columns {
		heads[i] = c.head
	}
	widths := t.widths(heads)
	t.line(b, widths, heads)
	for _, row := range t.rows {
		t.line(b, widths, row)
	}
}

func (t *table) widths(heads []string) []int {
	widths := make([]int, len(t.columns))
	for _, row := range append([][]string{heads}, t.rows...) {
		for i, cell := range row {
			if runsOn := len(row) < len(heads) && i == len(row)-1; !runsOn {
				widths[i] = max(widths[i], utf8.RuneCountInString(cell))
			}
		}
	}
	return widths
}

func (t *table) line(b *strings.Builder, widths []int, cells []string) {
	var line strings.Builder
	for i, cell := range cells {
		line.WriteString("  ")
		gap := strings.Repeat(" ", max(0, widths[i]-utf8.RuneCountInString(cell)))
		if t.columns[i].right && !(len(cells) < len(t.columns) && i == len(cells)-1) {
			line.WriteString(gap + cell)
		} else {
			line.WriteString(cell + gap)
		}
	}
	b.WriteString(strings.TrimRight(line.String(), " ") + "\n")
}
