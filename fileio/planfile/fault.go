package planfile

import "fmt"

// Fault is why a file cannot be read, or a plan not be written.
type Fault struct {
	File  string // as given to Read; empty when writing
	Where string // item and field, or line and column
	Text  string // what is wrong and what would be right
}

// Error returns "FILE: WHERE: TEXT", leaving out what is empty.
func (f *Fault) Error() string {
	s := f.Text
	if f.Where != "" {
		s = f.Where + ": " + s
	}
	if f.File != "" {
		s = f.File + ": " + s
	}
	return s
}

func faultf(where, format string, args ...any) *Fault {
	return &Fault{Where: where, Text: fmt.Sprintf(format, args...)}
}
