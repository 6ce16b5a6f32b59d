package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
	"hoopsheet/core/diaphragm"
)

func TestAirMassFactors(t *testing.T) {
	j := bessel.ZeroJ(0, 1)
	slope := bessel.JPrime(0, j)

	// Copson's closed form.
	const v = 0.5
	value, derivative := bessel.J(v, j), bessel.JPrime(v, j)
	open := (derivative*derivative + (1-v*v/(j*j))*value*value) / (j * slope * slope)
	// Half a unit of the tenth digit.
	if math.Abs(open-airMassOpen) > 5e-11 {
		t.Errorf("open factor %.12f, constant %.10f", open, airMassOpen)
	}

	// Gamma by the trapezoidal rule to K; beyond, 2 j^2 J_0^2/k^4 with J_0^2
	// at most 2/(pi k) leaves less than j^2/(pi K^4) = 1.2e-11. The integrand is
	// even, smooth and of exponential type 2 (J_0(k)^2 over a factor that
	// removes no smoothness at k = j), so steps below pi leave an error that
	// is only that of the cut.
	const step, last = 0.25, 20000
	sum := 0.0
	for i := range last {
		k := float64(i) * step
		f := bessel.J(0, k) / (j*j - k*k)
		f *= f
		if i == 0 {
			f /= 2
		}
		sum += f
	}
	baffled := 2 * j * j * step * sum
	if math.Abs(baffled-airMassBaffled) > 1e-10 {
		t.Errorf("baffled factor %.12f, constant %.10f", baffled, airMassBaffled)
	}
}

func TestAirMass(t *testing.T) {
	faces := func(upper, lower diaphragm.FaceKind) diaphragm.Faces {
		return diaphragm.Faces{Upper: diaphragm.Face{Kind: upper}, Lower: diaphragm.Face{Kind: lower}}
	}
	for _, c := range []struct {
		upper, lower diaphragm.FaceKind
		share        float64
		known        bool
	}{
		{diaphragm.FaceVacuum, diaphragm.FaceVacuum, 0, true},
		{diaphragm.FaceOpen, diaphragm.FaceOpen, 2 * 2 * airMassOpen, true},
		{diaphragm.FaceBaffled, diaphragm.FaceVacuum, 2 * airMassBaffled, true},
		{diaphragm.FaceBaffled, diaphragm.FaceCavity, 0, false},
	} {
		share, known := AirMass(2, faces(c.upper, c.lower))
		if share != c.share || known != c.known {
			t.Errorf("%s above, %s below: %v %v, want %v %v", c.upper, c.lower, share, known, c.share, c.known)
		}
	}
}
