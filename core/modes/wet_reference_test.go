package modes

import (
	"encoding/json"
	"math/cmplx"
	"os"
	"testing"

	"hoopsheet/core/diaphragm"
)

func TestWetReference(t *testing.T) {
	// Complex modes by SciPy, put together by quadrature alone: the script and
	// what it shares with the code under test are in testdata/wet.
	data, err := os.ReadFile("../../testdata/wet/reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Cases []struct {
			Name                                               string
			Kind                                               diaphragm.FaceKind
			Sides                                              int
			Radius, Tension, ArealDensity, Density, SoundSpeed float64
			M                                                  int
			Omega                                              [][2]float64
		}
	}
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Cases) != 15 {
		t.Fatalf("%d cases, want 15", len(file.Cases))
	}
	for _, c := range file.Cases {
		face := Face{Kind: c.Kind, Density: c.Density, SoundSpeed: c.SoundSpeed}
		r := Real{Radius: c.Radius, Tension: c.Tension, ArealDensity: c.ArealDensity, Upper: face, Lower: face}
		if c.Sides == 1 {
			r.Lower = Face{Kind: diaphragm.FaceVacuum}
		}
		s := solve(t, r, Request{MaxM: c.M, MaxN: 4, Effects: AllEffects()})
		for i, part := range c.Omega {
			want := complex(part[0], part[1])
			mode := modeOf(t, s, c.M, i+1)
			// Quadrature to 1e-10 of the matrices; open faces converge like a power
			// of the number of shapes, which is 26 there and 22 here.
			tolerance := 1e-9
			if c.Kind == diaphragm.FaceOpen {
				tolerance = 2e-8
			}
			if d := cmplx.Abs(mode.Omega()-want) / cmplx.Abs(want); d > tolerance {
				t.Errorf("%s (%d,%d): %.12g, SciPy %.12g, apart %.2g", c.Name, c.M, i+1, mode.Omega(), want, d)
			}
		}
	}
}
