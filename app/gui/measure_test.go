package gui

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestParseLength(t *testing.T) {
	for _, c := range []struct {
		text, unit string
		want       int32
	}{
		{"2.40", "m", 24000}, {"2,40", "m", 24000}, {" 2,4 ", "m", 24000}, {".5", "m", 5000}, {"-3", "m", -30000},
		{"−3", "m", -30000}, {"240", "cm", 24000}, {"2400", "mm", 24000}, {"2400 mm", "m", 24000}, {"2.4m", "cm", 24000},
		{"0.00004", "m", 0}, {"0.00005", "m", 1}, {"1", "", 10000},
		{`1'`, "ft", 3048}, {`1`, "ft", 3048}, {`6"`, "ft", 1524}, {`5' 11"`, "m", 5*3048 + 11*254},
		{`5'11 1/2"`, "m", 5*3048 + 11*254 + 127}, {"5 ft 11", "m", 5*3048 + 11*254}, {`1/2"`, "ft", 127}, {"5′ 6″", "ft", 16764},
	} {
		if got, err := parseLength(c.text, c.unit); err != nil || got != c.want {
			t.Errorf("parseLength(%q, %q) = %d, %v; want %d", c.text, c.unit, got, err, c.want)
		}
	}
	for _, text := range []string{"", " ", "-", "two", "2.4.5", "1/0", "3 parsecs", "1e3", "60000", "--3", ".", "5 m 20"} {
		if got, err := parseLength(text, "m"); err == nil {
			t.Errorf("parseLength(%q) = %d, want an error", text, got)
		}
	}
}

// TestLengthLaws: what is written reads back as the same length, in every unit.
func TestLengthLaws(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := rapid.Int32Range(-1<<29+1, 1<<29-1).Draw(t, "v")
		unit := rapid.SampledFrom([]string{"m", "cm", "mm", "ft"}).Draw(t, "unit")
		text := formatLength(v, unit)
		got, err := parseLength(text, unit)
		if err != nil || got != v {
			t.Fatalf("%d written as %q %s reads back as %d, %v", v, text, unit, got, err)
		}
	})
}

// TestFeetReadBackAsTyped: every whole sixteenth of an inch is written as it was typed.
func TestFeetReadBackAsTyped(t *testing.T) {
	for _, text := range []string{`0' 0"`, `5' 11 1/2"`, `12' 1/16"`, `100' 3 15/16"`, `-2' 6 3/8"`, `0' 1/2"`} {
		v, err := parseLength(text, "ft")
		if err != nil {
			t.Errorf("%s: %v", text, err)
			continue
		}
		if back, _ := parseLength(formatLength(v, "ft"), "ft"); back != v {
			t.Errorf("%s became %s", text, formatLength(v, "ft"))
		}
	}
	if got := formatLength(5*3048+11*254+127, "ft"); got != `5' 11 1/2"` {
		t.Errorf("got %s", got)
	}
}

func TestFormatLength(t *testing.T) {
	for _, c := range []struct {
		v          int32
		unit, want string
	}{
		{16000, "m", "1.60"}, {250000, "m", "25.00"}, {12345, "m", "1.2345"}, {-5, "m", "-0.0005"}, {16000, "cm", "160.0"},
		{16005, "mm", "1600.5"}, {16000, "mm", "1600"}, {0, "m", "0.00"},
	} {
		if got := formatLength(c.v, c.unit); got != c.want {
			t.Errorf("formatLength(%d, %q) = %q, want %q", c.v, c.unit, got, c.want)
		}
	}
}

func TestParseNumber(t *testing.T) {
	for text, want := range map[string]float64{"200": 200, "200,5": 200.5, " -90° ": -90, "0.25": 0.25, "-0": 0} {
		if got, err := parseNumber(text); err != nil || got != want || math.Signbit(got) != (want < 0) {
			t.Errorf("parseNumber(%q) = %v, %v", text, got, err)
		}
	}
	for _, text := range []string{"", "north", "NaN", "inf", "1,2,3"} {
		if _, err := parseNumber(text); err == nil {
			t.Errorf("parseNumber(%q) must fail", text)
		}
	}
}
