// Package report writes what a study found: [Text] as tables to read, [JSON] as one object for other programs.
//
// The text is in the plan's display unit, rounded for reading; JSON is in the unit that each member's name ends on, to full
// float precision, with null where there is no number. Both list everything in the plan's order, so the same plan gives the
// same bytes, and both end with the [Caution].
package report
