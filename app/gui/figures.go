package gui

// farText writes how far it is, of millimetres, in the plan's unit and as the picture writes it.
func farText(unit string, mm float64) string {
	switch unit {
	case "ft":
		return number(mm/304.8, 1) + " ft"
	case "cm":
		return number(mm/10, 0) + " cm"
	case "mm":
		return number(mm, 0) + " mm"
	}
	return metres(mm, 1) + " m"
}

// wideText writes how wide a way is, of millimetres, to the centimetre or finer, in the plan's unit.
func wideText(unit string, mm float64) string {
	switch unit {
	case "ft":
		return number(mm/304.8, 2) + " ft"
	case "cm", "mm":
		return farText(unit, mm)
	}
	return metres(mm, 2) + " m"
}

// areaText writes an area of m² and the name of its unit: square feet where lengths are feet and inches.
func areaText(unit string, m2 float64, decimals int) (value, name string) {
	if unit == "ft" {
		return number(m2/(0.3048*0.3048), 1), "ft²"
	}
	return number(m2, decimals), "m²"
}

// areaWords writes an area of a ring of the plan with its unit.
func areaWords(unit string, m2 float64, decimals int) string {
	value, name := areaText(unit, m2, decimals)
	return value + " " + name
}
