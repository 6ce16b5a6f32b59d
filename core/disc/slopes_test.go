package disc

import (
	"math"
	"math/rand/v2"
	"testing"
)

// By Green's theorem the integral of |grad f|^2 is the sum of j^2 Norm a^2.
func TestSlopesEnergy(t *testing.T) {
	rng := rand.New(rand.NewPCG(9, 9))
	for _, band := range bands[:6] {
		b := NewBasis(band.M, band.N)
		g := NewGrid(MinRadii(band.M, band.N), MinAngles(band.M))
		s := NewSlopes(b, g.R, g.NTheta)
		c := randomCoef(b, rng)
		dr, dt := make([]float64, g.Len()), make([]float64, g.Len())
		s.Synthesise(dr, dt, c)
		got, want := g.Energy(dr)+g.Energy(dt), b.Roughness(c, 1)
		// Same sums as Parseval, which is stated to 1e-13.
		if math.Abs(got-want) > 1e-13*want {
			t.Errorf("M=%d N=%d: integral of |grad f|^2 %.16g, from coefficients %.16g", band.M, band.N, got, want)
		}
	}
}

func TestSlopesAgainstDifferences(t *testing.T) {
	rng := rand.New(rand.NewPCG(9, 1))
	b := NewBasis(4, 3)
	c := randomCoef(b, rng)
	radii := []float64{0.2, 0.6, 0.9}
	nt := 10
	s := NewSlopes(b, radii, nt)
	dr, dt := make([]float64, s.Len()), make([]float64, s.Len())
	s.Synthesise(dr, dt, c)
	const h = 1e-4
	for i, r := range radii {
		for k := 0; k < nt; k++ {
			th := 2 * math.Pi * float64(k) / float64(nt)
			v := make([]float64, 4)
			NewPoints(b, []float64{r + h, r - h, r, r}, []float64{th, th, th + h, th - h}).Synthesise(v, c)
			// Central differences err by h^2/6 of the third derivative, at most
			// j^3 = 2500 a coefficient of size 1 to 3, of which there are 24.
			const tol = h * h / 6 * 2500 * 3 * 24
			if got, want := dr[i*nt+k], (v[0]-v[1])/(2*h); math.Abs(got-want) > tol {
				t.Errorf("r=%g theta=%g: df/dr %g, difference %g", r, th, got, want)
			}
			if got, want := dt[i*nt+k], (v[2]-v[3])/(2*h*r); math.Abs(got-want) > tol/r {
				t.Errorf("r=%g theta=%g: df/dtheta/r %g, difference %g", r, th, got, want)
			}
		}
	}
	if n := testing.AllocsPerRun(5, func() { s.Synthesise(dr, dt, c) }); n != 0 {
		t.Errorf("%g allocations, want none", n)
	}
}

// At the centre only m = 1 has a slope: (a_1n cos + b_1n sin) j_1n / 2 along an
// angle, and the rim has no slope around.
func TestSlopesAtCentreAndRim(t *testing.T) {
	b := NewBasis(3, 2)
	c := make([]float64, b.Len())
	c[b.Index(0, 1, Cos)], c[b.Index(1, 2, Cos)], c[b.Index(1, 1, Sin)], c[b.Index(3, 1, Cos)] = 1, 2, 3, 4
	s := NewSlopes(b, []float64{0, 1}, 8)
	dr, dt := make([]float64, 16), make([]float64, 16)
	s.Synthesise(dr, dt, c)
	for k := range 8 {
		sin, cos := math.Sincos(math.Pi / 4 * float64(k))
		x, y := 2*b.Zero(1, 2)/2, 3*b.Zero(1, 1)/2
		if math.Abs(dr[k]-(x*cos+y*sin)) > 1e-14*10 || math.Abs(dt[k]-(y*cos-x*sin)) > 1e-14*10 {
			t.Errorf("centre, angle %d: %g %g", k, dr[k], dt[k])
		}
		want := -b.Zero(0, 1)*b.Slope(0, 1) - 2*b.Zero(1, 2)*b.Slope(1, 2)*cos - 3*b.Zero(1, 1)*b.Slope(1, 1)*sin - 4*b.Zero(3, 1)*b.Slope(3, 1)*math.Cos(3*math.Pi/4*float64(k))
		if math.Abs(dr[8+k]-want) > 1e-13 || dt[8+k] != 0 {
			t.Errorf("rim, angle %d: %g %g, want %g 0", k, dr[8+k], dt[8+k], want)
		}
	}
}
