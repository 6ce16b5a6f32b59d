package modes

import (
	"math"
	"slices"
	"testing"

	"hoopsheet/core/bessel"
)

// Rayleigh, Theory of Sound, ch. IX; Morse, Vibration and Sound; Kinsler &
// Frey, Fundamentals of Acoustics, print f_mn/f_01 to three decimals; the ten
// digits were recomputed with mpmath. The table stops at m = 8, so (9,1) and (10,1)
// are not in it.
var publishedRatios = []struct {
	m, n  int
	ratio float64
}{
	{0, 1, 1}, {1, 1, 1.593340506}, {2, 1, 2.135548787}, {0, 2, 2.295417267},
	{3, 1, 2.653066405}, {1, 2, 2.917295455}, {4, 1, 3.155464815}, {2, 2, 3.50014749},
	{0, 3, 3.598484674}, {5, 1, 3.647451179}, {3, 2, 4.058931883}, {6, 1, 4.13173816},
	{1, 3, 4.230439128}, {4, 2, 4.601044534}, {7, 1, 4.610051645}, {2, 3, 4.831885263},
	{0, 4, 4.903280573}, {8, 1, 5.083567174}, {5, 2, 5.130768907}, {3, 3, 5.41211843},
	{1, 4, 5.54039851}, {6, 2, 5.650842377}, {4, 3, 5.976540222}, {2, 4, 6.152609172},
}

func TestIdealRatios(t *testing.T) {
	list := Ideal(0.6, 2400, 0.07, len(publishedRatios)+2)
	lowest := list[0].Frequency
	list = slices.DeleteFunc(list, func(m Mode) bool { return m.M > 8 })
	for i, want := range publishedRatios {
		got := list[i]
		if got.M != want.m || got.N != want.n {
			t.Fatalf("mode %d is (%d,%d), want (%d,%d)", i, got.M, got.N, want.m, want.n)
		}
		// Half a unit of the last of ten printed digits.
		if ratio := got.Frequency / lowest; math.Abs(ratio-want.ratio) > 5e-10*want.ratio {
			t.Errorf("f_%d%d/f_01 = %.12g, want %.10g", want.m, want.n, ratio, want.ratio)
		}
	}
}

func TestIdealFundamental(t *testing.T) {
	// f_01 = (j_01/pi) sqrt(T/sigma)/D with j_01/pi = 0.76547974956201, from
	// j_01 in Abramowitz & Stegun, Table 9.5. The 0.766 that is often copied is
	// 0.07 % high.
	const diameter, tension, sigma = 1.5, 180.0, 0.032
	want := 0.76547974956201 * math.Sqrt(tension/sigma) / diameter
	got := Ideal(diameter/2, tension, sigma, 1)[0].Frequency
	if math.Abs(got-want) > 1e-13*want {
		t.Errorf("f_01 = %.15g, want %.15g", got, want)
	}
}

func TestIdealIsComplete(t *testing.T) {
	// An independent count: every zero up to the last listed, order by order,
	// by sign changes of J_m on a grid finer than the least gap of zeros (above
	// 3 for m = 0, DLMF 10.21(iv)) and refined by bisection.
	const count = 400
	list := Ideal(1, 1, 1, count)
	if len(list) != count {
		t.Fatalf("%d modes, want %d", len(list), count)
	}
	last := list[count-1].Zero
	seen := map[[2]int]bool{}
	for i, mode := range list {
		if seen[[2]int{mode.M, mode.N}] {
			t.Errorf("(%d,%d) is listed twice", mode.M, mode.N)
		}
		seen[[2]int{mode.M, mode.N}] = true
		if i > 0 && !(mode.Zero > list[i-1].Zero) {
			t.Errorf("mode %d is not above the one before", i)
		}
	}
	found := 0
	const h = 0.5
	for m := 0; float64(m) <= last; m++ {
		n := 0
		for x := math.Max(h, float64(m)); x < last; x += h {
			next := math.Min(x+h, math.Nextafter(last, math.Inf(1)))
			if (bessel.JInt(m, x) < 0) != (bessel.JInt(m, next) < 0) {
				n++
				found++
				if !seen[[2]int{m, n}] {
					t.Errorf("(%d,%d) lies below the last mode and is not listed", m, n)
				}
			}
		}
	}
	// The last zero itself may fall on either side of the end of the sweep.
	if found != count && found != count-1 {
		t.Errorf("the sweep finds %d zeros, the list has %d", found, count)
	}
}

func TestIdealRefusesNonsense(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, bad := range [][3]float64{{0, 1, 1}, {1, 0, 1}, {1, 1, 0}, {-1, 1, 1}, {nan, 1, 1}, {1, inf, 1}} {
		if list := Ideal(bad[0], bad[1], bad[2], 3); list != nil {
			t.Errorf("Ideal(%v) = %v, want nil", bad, list)
		}
	}
	if list := Ideal(1, 1, 1, 0); list != nil {
		t.Errorf("count 0 gives %v", list)
	}
}

func TestNodalCircles(t *testing.T) {
	// Quotients of the zeros in Abramowitz & Stegun, Table 9.5: 2.4048255577,
	// 5.5200781103, 8.6537279129; 3.8317059702, 7.0155866698. A printed text
	// prints 42.6 % for (0,2).
	want := map[[2]int][]float64{
		{0, 1}: {},
		{0, 2}: {0.4356506},
		{0, 3}: {0.2778948, 0.6378844},
		{1, 2}: {0.5461704},
	}
	for _, mode := range Ideal(2, 300, 0.05, 9) {
		radii, listed := want[[2]int{mode.M, mode.N}]
		if !listed {
			continue
		}
		if mode.CircleRadii == nil || len(mode.CircleRadii) != len(radii) {
			t.Errorf("(%d,%d) has circles %v, want %v", mode.M, mode.N, mode.CircleRadii, radii)
			continue
		}
		for i, r := range radii {
			// Half a unit of the last printed digit.
			if math.Abs(mode.CircleRadii[i]-r) > 5e-8 {
				t.Errorf("(%d,%d) circle %d at %.9f, want %.7f", mode.M, mode.N, i, mode.CircleRadii[i], r)
			}
		}
	}
}

func TestNodalLines(t *testing.T) {
	for _, c := range []struct {
		m, n int
		want string
	}{
		{0, 1, "none inside the rim"},
		{1, 1, "1 diameter"},
		{3, 1, "3 diameters"},
		{0, 2, "1 circle"},
		{2, 3, "2 diameters, 2 circles"},
	} {
		if got := (Mode{M: c.m, N: c.n}).NodalLines(); got != c.want {
			t.Errorf("(%d,%d): %q, want %q", c.m, c.n, got, c.want)
		}
	}
}

func TestSeparation(t *testing.T) {
	for _, c := range []struct {
		frequency, line, halfWidth, relative float64
		want                                 Clearance
	}{
		{50, 50, 0.05, 0, Hit},
		{105, 100, 0.05, 0.05, Hit}, // the bound belongs to the worse verdict
		{95, 100, 0.05, -0.05, Hit},
		{105.01, 100, 0.05, 0.0501, Near},
		{110, 100, 0.05, 0.1, Near},
		{90, 100, 0.05, -0.1, Near},
		{110.01, 100, 0.05, 0.1001, Clear},
		{25, 100, 0.05, -0.75, Clear},
	} {
		relative, got := Separation(c.frequency, c.line, c.halfWidth)
		if got != c.want || math.Abs(relative-c.relative) > 1e-15 {
			t.Errorf("%v against %v +- %v: %v %v, want %v %v", c.frequency, c.line, c.halfWidth, relative, got, c.relative, c.want)
		}
	}
}

func BenchmarkModesTable(b *testing.B) {
	for b.Loop() {
		Ideal(1.5, 200, 0.032, 400)
	}
}
