package response

import (
	"math"
	"testing"

	"hoopsheet/core/disc"
)

// marchedDisc marches the free ideal sheet of unit radius and wave speed, order by
// order up to the given one, by finite volumes in radius on n cells and leapfrog
// in time: another discretisation, without Bessel functions, whose error is of
// order h^2 where the solution is smooth. Of a form it begins at rest with it, or
// with it as its velocity. It returns the orders' cosine and sine parts in the
// middle of every cell.
func marchedDisc(f form, velocity bool, orders, n int, end float64) [][2][]float64 {
	h := 1 / float64(n)
	const angles = 256
	parts := make([][2][]float64, orders+1)
	for m := range parts {
		w := [2][]float64{make([]float64, n), make([]float64, n)}
		for i := range n {
			for k := range angles {
				theta := 2 * math.Pi * float64(k) / angles
				sin, cos := math.Sincos(float64(m) * theta)
				v := f.at((float64(i)+0.5)*h, theta) * 2 / angles
				if m == 0 {
					v /= 2
				}
				w[0][i] += v * cos
				w[1][i] += v * sin
			}
		}
		// The largest eigenvalue is below 4/h^2 and what m^2/r^2 adds in the first
		// cell, where w of such an order is nothing.
		steps := int(math.Ceil(end / h * (1 + float64(m))))
		dt := end / float64(steps)
		for part := range w {
			now, before, next := w[part], make([]float64, n), make([]float64, n)
			for k := range steps {
				for i := range n {
					r := (float64(i) + 0.5) * h
					inner, outer := 0.0, -now[i] // the rim is halfway to the mirrored value
					if i > 0 {
						inner = now[i-1]
					}
					if i < n-1 {
						outer = now[i+1]
					}
					curve := ((r+h/2)*(outer-now[i])-(r-h/2)*(now[i]-inner))/(r*h*h) - float64(m*m)/(r*r)*now[i]
					switch {
					case k > 0:
						next[i] = 2*now[i] - before[i] + dt*dt*curve
					case velocity:
						next[i] = dt * now[i]
					default:
						next[i] = now[i] + dt*dt/2*curve
					}
				}
				if k == 0 && velocity {
					clear(now)
				}
				before, now, next = now, next, before
			}
			parts[m][part] = now
		}
	}
	return parts
}

// TestAgainstMarchingTheDisc holds free responses off the centre against marching,
// on grids twice and twice as fine. The difference must shrink at the rate that
// theory gives the marching, which it can only as long as the modes are right to
// far better: for data with s derivatives in the mean square, where a jump of the
// k-th derivative means s = k + 1/2, it is 2 s/3 powers of h, at most two (Brenner,
// Thomee and Wahlbin, Besov Spaces and Applications to Difference Methods for
// Initial Value Problems, Springer 1975, doi:10.1007/BFb0068125, from memory).
func TestAgainstMarchingTheDisc(t *testing.T) {
	const orders, end = 12, 1.7
	for _, c := range []struct {
		name  string
		shape Shape
		// velocity: begin with the shape as velocity, which is one derivative
		// smoother in w.
		velocity bool
		s        float64
	}{
		{"bump, three derivatives", Shape{Kind: ShapeBump, Peak: 1, Radius: 0.35, Angle: 0.8, Width: 0.6}, false, 3.5},
		{"pad, a jump of curvature", Shape{Kind: ShapePoint, Peak: 1, Radius: 0.35, Angle: 0.8, Width: 0.3}, false, 2.5},
		{"blow on a patch, a jump of velocity", Shape{Kind: ShapePatch, Peak: 1, Radius: 0.35, Angle: 0.8, Width: 0.3}, true, 1.5},
	} {
		kind := SourceDisplacement
		if c.velocity {
			kind = SourceVelocity
		}
		begin := started(t, struckCase(orders, 60, Source{Kind: kind, Shape: c.shape}))
		mo := begin.moves
		coef := make([]float64, mo.basis.Len())
		mo.values(coef, end, 0)
		f, _ := c.shape.form(mo.basis, "", 1)
		var errors []float64
		grids := []int{40, 80, 160}
		for _, n := range grids {
			radii := make([]float64, n)
			for i := range radii {
				radii[i] = (float64(i) + 0.5) / float64(n)
			}
			table := disc.NewTable(mo.basis, radii, 32)
			values := make([]float64, table.Len())
			table.Synthesise(values, coef)
			parts := marchedDisc(f, c.velocity, orders, n, end)
			var sum, whole float64
			for i, r := range radii {
				for k := range 32 {
					var w float64
					for m := range parts {
						sin, cos := math.Sincos(float64(m*k) * math.Pi / 16)
						w += parts[m][0][i]*cos + parts[m][1][i]*sin
					}
					v := values[i*32+k]
					sum += r * (v - w) * (v - w)
					whole += r * v * v
				}
			}
			errors = append(errors, math.Sqrt(sum/whole))
		}
		// Of three grids the rates approach the limit; half a power is the most that
		// a rate of theirs may be below it before the next term, one power of h
		// higher and as large on the coarsest grid, explains it: log2((1+1)/(1+1/2))
		// = 0.42.
		rate := math.Min(2, 2*c.s/3)
		for i := 1; i < len(errors); i++ {
			got := math.Log2(errors[i-1] / errors[i])
			t.Logf("%s: %d cells differ by %.2g, rate %.2f, theory %.2f", c.name, grids[i], errors[i], got, rate)
			if got < rate-0.42 {
				t.Errorf("%s: the difference to %d cells shrinks at a rate of %.2f, theory says %.2f", c.name, grids[i], got, rate)
			}
		}
	}
}
