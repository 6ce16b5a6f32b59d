package disc

import (
	"math"
	"math/rand/v2"
	"testing"

	"hoopsheet/core/bessel"
)

// Table and Points against the plain double sum.
func TestSynthesisAgainstPlainSum(t *testing.T) {
	rng := rand.New(rand.NewPCG(6, 1))
	for _, band := range bands[:5] {
		b := NewBasis(band.M, band.N)
		c := randomCoef(b, rng)
		// A sine of order 0 must be ignored.
		c[b.Index(0, 1, Sin)] = 7
		radii := []float64{0, 0.01, 0.1, 0.35, 0.7, 0.95, 1}
		nt := MinAngles(band.M)
		tab := NewTable(b, radii, nt)
		frame := make([]float64, tab.Len())
		tab.Synthesise(frame, c)

		var r, th []float64
		for _, ri := range radii {
			for k := 0; k < nt; k++ {
				r, th = append(r, ri), append(th, 2*math.Pi*float64(k)/float64(nt))
			}
		}
		scattered := make([]float64, len(r))
		NewPoints(b, r, th).Synthesise(scattered, c)

		for i := range r {
			var sum, size float64
			for l, v := range c {
				m, n, p := b.At(l)
				if m == 0 && p == Sin {
					continue
				}
				j := bessel.JInt(m, b.Zero(m, n)*r[i])
				if r[i] == 1 {
					j = 0 // a zero of J_m, but for the rounding of j_mn
				}
				sum += v * j * angular(m, p, th[i])
				size += math.Abs(v * j)
			}
			// Three sums in different order; each term carries the rounding of
			// the angle, up to 2 pi M 2^-53, the sums a few units each.
			tol := (16 + 7*float64(band.M)) * 0x1p-53 * size
			if math.Abs(frame[i]-sum) > tol || math.Abs(scattered[i]-sum) > tol {
				t.Errorf("M=%d N=%d r=%g theta=%g: table %g points %g sum %g, allowed %g", band.M, band.N, r[i], th[i], frame[i], scattered[i], sum, tol)
			}
		}
	}
}

// The rule of MinRadii is enough for every band: a round trip at its size is no
// worse than at a far finer one.
func TestMinRadiiIsEnough(t *testing.T) {
	rng := rand.New(rand.NewPCG(2, 9))
	for M := 0; M <= 36; M += 6 {
		for _, N := range []int{1, 2, 3, 6, 12, 24} {
			b := NewBasis(M, N)
			c := randomCoef(b, rng)
			tr := NewTransformOf(b, 0, 0)
			f := make([]float64, tr.Grid.Len())
			back := make([]float64, b.Len())
			tr.Synthesise(f, c)
			tr.Analyse(back, f)
			// Argument rounding j 2^-53 enters each table entry; a coefficient
			// sees the root of N such entries over its norm, 1/(pi j): allow
			// j_MN 2^-53 (8 + 2 sqrt(N)).
			tol := b.Zero(M, N) * 0x1p-53 * (8 + 2*math.Sqrt(float64(N)))
			for i := range c {
				if d := math.Abs(back[i] - c[i]); d > tol {
					m, n, p := b.At(i)
					t.Errorf("M=%d N=%d: (%d,%d,%d) off by %.2g, allowed %.2g", M, N, m, n, p, d, tol)
				}
			}
		}
	}
}

// What is left out of a panel is below its floor, what is kept is complete.
func TestPanelFloor(t *testing.T) {
	b := NewBasis(60, 6)
	g := NewGrid(80, 2)
	tab := newRadialTable(b, g.R, atZero)
	left := 0
	for m := 0; m <= b.M; m++ {
		for n := 1; n <= b.N; n++ {
			for i, r := range g.R {
				want := bessel.JInt(m, b.Zero(m, n)*r)
				got := tab.value(m, n, i)
				if got == 0 && want != 0 {
					left++
					if math.Abs(want) > panelFloor {
						t.Errorf("m=%d n=%d r=%g: %g left out", m, n, r, want)
					}
				} else if got != want {
					t.Errorf("m=%d n=%d r=%g: %g in the table, want %g", m, n, r, got, want)
				}
			}
		}
	}
	if left == 0 {
		t.Error("nothing was left out: the test sees one side of the switch only")
	}
}

func TestSynthesisDoesNotAllocate(t *testing.T) {
	b := NewBasis(5, 5)
	tab := NewTable(b, []float64{0, 0.5, 1}, 24)
	p := NewPoints(b, []float64{0.1, 0.2}, []float64{1, 2})
	c := make([]float64, b.Len())
	f, v := make([]float64, tab.Len()), make([]float64, p.Len())
	if n := testing.AllocsPerRun(10, func() { tab.Synthesise(f, c); p.Synthesise(v, c) }); n != 0 {
		t.Errorf("%g allocations, want none", n)
	}
}

func TestAngles(t *testing.T) {
	for _, c := range []struct{ n, want int }{{0, 2}, {1, 2}, {2, 2}, {7, 8}, {14, 16}, {62, 64}, {130, 144}, {360, 360}, {361, 384}} {
		if got := NextAngles(c.n); got != c.want {
			t.Errorf("NextAngles(%d) = %d, want %d", c.n, got, c.want)
		}
	}
}

func TestProgrammingMistakesPanic(t *testing.T) {
	b := NewBasis(3, 3)
	tr := NewTransformOf(b, 0, 0)
	for name, f := range map[string]func(){
		errBand:          func() { NewBasis(-1, 3) },
		errBand + "2":    func() { NewBasis(1, 0) },
		errIndex:         func() { b.Index(4, 1, Cos) },
		errIndex + "2":   func() { b.Index(0, 0, Cos) },
		errIndex + "3":   func() { b.At(b.Len()) },
		errAngles:        func() { NewGrid(4, 14) },
		errAngles + "2":  func() { NewGrid(4, 9) },
		errFewAngles:     func() { NewTable(b, []float64{0.5}, 6) },
		errFewRadii:      func() { NewTransform(3, 3, 4, 0) },
		errRadius:        func() { NewTable(b, []float64{0.5, 1.1}, 8) },
		errRadius + "2":  func() { NewTable(b, []float64{0.5, 0.4}, 8) },
		errRadius + "3":  func() { NewPoints(b, []float64{math.NaN()}, []float64{0}) },
		errLength:        func() { tr.Analyse(make([]float64, 3), make([]float64, tr.Grid.Len())) },
		errLength + "2":  func() { tr.Synthesise(make([]float64, 3), make([]float64, b.Len())) },
		errRule:          func() { RadialRule(make([]float64, 2), make([]float64, 2), -0.5) },
		errRule + "2":    func() { NewGrid(0, 4) },
		errLength + "3":  func() { NewConverter(b, 1, HeldEdge, 4).ToBessel(nil, nil) },
		errEdge + "conv": func() { NewConverter(b, 1, RootEdge, 4) },
	} {
		func() {
			defer func() {
				if r, ok := recover().(string); !ok || r == "" {
					t.Errorf("%s: panicked with %v, want a message", name, r)
				}
			}()
			f()
			t.Errorf("%s: no panic", name)
		}()
	}
}

// FuzzRoundTrip draws a band and one coefficient pattern from the input.
func FuzzRoundTrip(f *testing.F) {
	f.Add(uint8(0), uint8(1), uint64(1))
	f.Add(uint8(7), uint8(3), uint64(2))
	f.Add(uint8(31), uint8(31), uint64(3))
	f.Fuzz(func(t *testing.T, M, N uint8, seed uint64) {
		b := NewBasis(int(M%32), int(N%31)+1)
		tr := NewTransformOf(b, 0, 0)
		c := randomCoef(b, rand.New(rand.NewPCG(seed, 0)))
		s, back := make([]float64, tr.Grid.Len()), make([]float64, b.Len())
		tr.Synthesise(s, c)
		q := tr.Analyse(back, s)
		for i := range c {
			if math.Abs(back[i]-c[i]) > 1e-12*8 {
				t.Fatalf("coefficient %d: %g comes back as %g", i, c[i], back[i])
			}
		}
		if q.Missed > 1e-13 {
			t.Fatalf("missed %g", q.Missed)
		}
	})
}
