package report

import "testing"

func TestMeasure(t *testing.T) {
	for _, c := range []struct {
		unit string
		mm   float64
		want string
	}{
		{"m", 9862.0481, "9.86"}, {"m", -0.001, "0.00"}, {"cm", 9862.0481, "986.2"}, {"mm", 9862.0481, "9862"},
		{"ft", 304.8, `1' 0.0"`}, {"ft", 304.7, `1' 0.0"`}, {"ft", 25.4 * 11.94, `0' 11.9"`}, {"ft", -2 * 304.8, `-2' 0.0"`},
		{"ft", -0.1, `0' 0.0"`}, {"ft", 1600, `5' 3.0"`}, {"furlong", 1500, "1.50"},
	} {
		if got := measureFor(c.unit).length(c.mm); got != c.want {
			t.Errorf("%v mm in %s: got %s, want %s", c.mm, c.unit, got, c.want)
		}
	}
	if got := measureFor("ft").area(1); got != "10.8" { // 1 m² is 10.764 square feet
		t.Errorf("1 m² in feet: got %s", got)
	}
}
