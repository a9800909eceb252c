package walk

import "errors"

// ErrCrowded says that the gaps of a plan lie so that finding them all would take time that grows with the square of their
// number: thousands of long gaps side by side, such as lead from each end in a slanting row of walls to one long wall far off.
var ErrCrowded = errors.New("walk: too many long gaps lie side by side to find the clear width")

// Finding gaps takes a few steps for each triangle, some hundreds where many corners face one long wall. stepsPerTri are more than
// any plan needs whose gaps are not crowded; plans that are small are never given up.
var (
	stepsPerTri int64 = 2000
	fewSteps    int64 = 20_000_000
)

// crowded returns ErrCrowded once the search has taken too many steps.
func (p *pieces) crowded() error {
	if p.steps > fewSteps+stepsPerTri*int64(len(p.root)) {
		return ErrCrowded
	}
	return nil
}
