package spectrum

import "math"

// Display is a spectrum to be drawn: Level[i] belongs to the frequency Start + i Step.
type Display struct {
	Start, Step float64   // Hz
	Level       []float64 // dB below the largest (0 or less)
	Floor       []float64 // the noise floor on the same scale
	Seconds     float64   // how long a stretch it was taken over
}

// lowestLevel ends the scale of levels, in dB.
const lowestLevel = -200.0

// display fills d with at most points values from bins lo to hi. Where several bins share a value
// the largest is shown, so no peak vanishes; a floor value is the mean in dB of its bins' ends.
func (d *Display) fill(power, floor []float64, lo, hi, points int, step float64) {
	each := (hi - lo + points) / points
	n := (hi - lo + each) / each
	d.Start, d.Step = (float64(lo)+float64(each-1)/2)*step, float64(each)*step
	d.Level, d.Floor = resize(d.Level, n), resize(d.Floor, n)
	largest := 0.0
	for _, p := range power[lo : hi+1] {
		largest = max(largest, p)
	}
	for i := range n {
		first := lo + i*each
		last := min(first+each-1, hi)
		p := 0.0
		for _, v := range power[first : last+1] {
			p = max(p, v)
		}
		d.Level[i] = relative(p, largest)
		d.Floor[i] = (relative(floor[first], largest) + relative(floor[last], largest)) / 2
	}
}

// relative returns a power ratio in dB, not under lowestLevel.
func relative(p, whole float64) float64 {
	if p <= 0 || whole <= 0 {
		return lowestLevel
	}
	return max(lowestLevel, 10*math.Log10(p/whole))
}
