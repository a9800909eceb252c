package report

// Caution is what every study says last, wherever it is handed over.
const Caution = "Caution: this is the geometry of the plan as drawn, doors as they stand, in the plane of the eye; whoever walks is a " +
	"point or a disc. It knows no light, crowd or drawing error, certifies no safety, and stands in for no assessment of fire, escape, " +
	"access or security."
