package assets

import (
	"slices"

	"enfilade/testdata/plans"
)

// Sample is a plan that comes with the program.
type Sample struct {
	Name  string // what SamplePlan knows it by
	Title string // the plan's own title
	File  string // its file's name
}

// Samples returns the sample plans, the one to begin with first.
func Samples() []Sample {
	return []Sample{
		{"gallery", "Upper gallery", "gallery.enfilade"},
		{"harbour", "Harbour level", "harbour.enfilade"},
		{"training", "Training house", "training.enfilade"},
	}
}

// SamplePlan returns the text of a sample's plan file, or nil when there is no such sample.
func SamplePlan(name string) []byte {
	list := Samples()
	i := slices.IndexFunc(list, func(s Sample) bool { return s.Name == name })
	if i < 0 {
		return nil
	}
	text, err := plans.Files.ReadFile(list[i].File)
	if err != nil {
		panic("assets: sample " + name + " is not embedded")
	}
	return text
}
