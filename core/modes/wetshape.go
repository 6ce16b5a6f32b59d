package modes

import (
	"math"

	"hoopsheet/core/disc"
)

// shapeSteps is the number of steps of the radial grid on which shapes are
// looked at: at least four to each half wave for up to 20 nodal circles.
const shapeSteps = 96

// gridShapes returns the values of all shapes at r = i/shapeSteps, row by
// radius.
func (t *fluidTables) gridShapes() []float64 {
	t.mu.Lock()
	defer t.mu.Unlock()
	if t.grid == nil {
		g := make([]float64, (shapeSteps+1)*t.n)
		for i := range shapeSteps + 1 {
			disc.HeldEdge.Shapes(g[i*t.n:(i+1)*t.n], t.m, float64(i)/shapeSteps)
		}
		t.grid = g
	}
	return t.grid
}

// peak returns the value of largest magnitude of the radial function, with the
// sign that makes the function positive from the centre outwards.
func (o *wetOrder) peak(coef []float64) float64 {
	grid, n := o.tables.gridShapes(), o.strain.n
	values := make([]float64, shapeSteps+1)
	best, sign := 0, 0.0
	for i := range values {
		values[i] = dot(grid[i*n:(i+1)*n], coef)
		if math.Abs(values[i]) > math.Abs(values[best]) {
			best = i
		}
	}
	// The first lobe is the largest but for a few coupled modes; the centre
	// counts from 1 % of the largest on.
	for _, v := range values {
		if math.Abs(v) > 0.01*math.Abs(values[best]) {
			sign = math.Copysign(1, v)
			break
		}
	}
	size := math.Abs(values[best])
	if best > 0 && best < shapeSteps {
		// The vertex of the parabola through three values, and the value there:
		// its error is that of the place, squared.
		a, b, c := values[best-1], values[best], values[best+1]
		if bend := a - 2*b + c; bend != 0 {
			place := (float64(best) + (a-c)/(2*bend)) / shapeSteps
			shapes := make([]float64, n)
			disc.HeldEdge.Shapes(shapes, o.m, math.Min(1, place))
			size = math.Max(size, math.Abs(dot(shapes, coef)))
		}
	}
	return sign * size
}

// CircleRadii returns the radii of the nodal circles inside the rim, of the
// ring's radius, inside out.
func (m *RealMode) CircleRadii() []float64 {
	radii := []float64{}
	shapes := make([]float64, len(m.coef))
	at := func(x float64) float64 {
		disc.HeldEdge.Shapes(shapes, m.M, x)
		v := dot(shapes, m.coef)
		// Without the zeros at centre and rim.
		return v / (math.Pow(x, float64(m.M)) * (1 - x*x))
	}
	// Four steps to a half wave of the shortest wave the shapes hold.
	steps := 4 * (len(m.coef) + m.M/2)
	lo := 0.5 / float64(steps)
	before := at(lo)
	for i := 1; i < steps; i++ {
		x := float64(i) / float64(steps)
		v := at(x)
		if (v > 0) != (before > 0) {
			radii = append(radii, m.inner*root(at, lo, x))
		}
		lo, before = x, v
	}
	return radii
}
