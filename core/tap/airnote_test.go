package tap

import (
	"math"
	"strings"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

// TestAddedMassOpen recomputes the factors without baffle from their closed
// form (Copson's solution; table of ten digits).
func TestAddedMassOpen(t *testing.T) {
	for name, factor := range addedMass {
		j, v := bessel.ZeroJ(float64(name.M), name.N), float64(name.M)+0.5
		jv, dv := bessel.J(v, j), bessel.JPrime(v, j)
		slope := bessel.JPrime(float64(name.M), j)
		want := (dv*dv + (1-v*v/(j*j))*jv*jv) / (j * slope * slope)
		if math.Abs(factor.open-want) > 5.1e-10 { // half a unit of the last printed digit, at most
			t.Errorf("%v: table %.10g, closed form %.10g", name, factor.open, want)
		}
	}
}

// TestAddedMassBaffled recomputes the factors with baffle by quadrature of
//
//	2 j^2 integral from 0 to infinity of J_m(k)^2 / (j^2 - k^2)^2 dk
//
// Simpson's rule to k = 400 with the tail put at its mean, J_m^2 ~ 1/(pi k):
// the integrand falls like k^-5, so that the tail is j^2/(2 pi 400^4) < 3e-9
// and its error smaller; the step of 0.01 errs below 1e-9 on functions that
// change over a length of one.
func TestAddedMassBaffled(t *testing.T) {
	const end, count = 400.0, 40000
	const step = end / count
	for name, factor := range addedMass {
		m := float64(name.M)
		j := bessel.ZeroJ(m, name.N)
		slope := bessel.JPrime(m, j)
		integrand := func(k float64) float64 {
			if math.Abs(k-j) < 1e-4 { // J_m(k) = slope (k - j) there
				return slope * slope / ((j + k) * (j + k))
			}
			q := bessel.J(m, k) / (j*j - k*k)
			return q * q
		}
		sum := integrand(0) + integrand(end)
		for i := 1; i < count; i++ {
			sum += float64(2+2*(i%2)) * integrand(float64(i)*step)
		}
		want := 2 * j * j * sum * step / 3
		want += j * j / (2 * math.Pi * math.Pow(end, 4))
		if math.Abs(factor.baffled-want) > 1e-8 {
			t.Errorf("%v: table %.10g, quadrature %.10g", name, factor.baffled, want)
		}
	}
}

func TestAirNote(t *testing.T) {
	face := func(kind diaphragm.FaceKind) diaphragm.Face { return diaphragm.Face{Kind: kind, Depth: 0.5} }
	matches := []Match{{M: 1, N: 1}, {M: 2, N: 1}}
	// rho a / sigma = 1.2 x 1.5 / 0.03 = 60.
	const density, a, s = 1.2, 1.5, 0.03
	for _, row := range []struct {
		name         string
		upper, lower diaphragm.FaceKind
		matches      []Match
		factor       float64
		words        []string
	}{
		{"vacuum", diaphragm.FaceVacuum, diaphragm.FaceVacuum, matches, 1, []string{"No air moves"}},
		{"open", diaphragm.FaceOpen, diaphragm.FaceOpen, matches, 1 + 2*0.2867947214*60, []string{"is 60.", "mode (1, 1)", "35 times", "estimate of one mode"}},
		{"one baffled", diaphragm.FaceBaffled, diaphragm.FaceVacuum, matches, 1 + 0.3301319583*60, []string{"21 times"}},
		{"both baffled", diaphragm.FaceBaffled, diaphragm.FaceBaffled, []Match{{M: 0, N: 1}}, 1 + 2*0.7464351569*60, []string{"mode (0, 1)", "91 times"}},
		{"cavity", diaphragm.FaceBaffled, diaphragm.FaceCavity, matches, 1 + 0.3301319583*60, []string{"stiffens mode (0, 1)", "no factor is given"}},
		{"cavity and vacuum", diaphragm.FaceCavity, diaphragm.FaceVacuum, matches, 1, []string{"no factor is given"}},
		{"beyond the table", diaphragm.FaceBaffled, diaphragm.FaceVacuum, []Match{{M: 7, N: 1}}, 1 + 60/zeros[7][0], []string{"at least"}},
		{"nothing matched", diaphragm.FaceBaffled, diaphragm.FaceVacuum, nil, 1 + 0.7464351569*60, []string{"mode (0, 1)"}},
	} {
		air := Air{Density: density, Faces: diaphragm.Faces{Upper: face(row.upper), Lower: face(row.lower)}}
		note, factor := air.Note(a, s, row.matches)
		if math.Abs(factor/row.factor-1) > 1e-12 {
			t.Errorf("%s: factor %g, want %g", row.name, factor, row.factor)
		}
		for _, words := range row.words {
			if !strings.Contains(note, words) {
				t.Errorf("%s: %q lacks %q", row.name, note, words)
			}
		}
	}
}

// TestShortWaveFactor: beyond the table 1/j stands in, the limit of short
// waves. The factors of the table come down to it and never fall below.
func TestShortWaveFactor(t *testing.T) {
	for name, factor := range addedMass {
		short := 1 / bessel.ZeroJ(float64(name.M), name.N)
		if factor.open < short || factor.baffled < factor.open {
			t.Errorf("%v: open %g, baffled %g, short waves %g", name, factor.open, factor.baffled, short)
		}
	}
}
