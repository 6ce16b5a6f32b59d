package disc

import (
	"encoding/json"
	"math"
	"os"
	"testing"
)

// reference is testdata/disc/reference.json: 50-digit values, made by make.py
// beside it, rounded to double.
type reference struct {
	Source     string
	Shapes     [][]any // family, m, j, r, u_j(r)
	Hankel     [][]any // family, m, j, k, Hankel transform
	Forms      [][]any // family, m, i, j, p, value or "inf"
	Mass       [][]any // family, m, i, j, value
	Coupling   [][]any // family, m, j, q, value
	Sound      [][]any // family, m, i, j, k0, real, imaginary
	GammaRatio [][]float64
	Power      [][]float64
}

func loadReference(t *testing.T) *reference {
	t.Helper()
	data, err := os.ReadFile("../../testdata/disc/reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var ref reference
	if err := json.Unmarshal(data, &ref); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		name      string
		got, want int
	}{
		{"shapes", len(ref.Shapes), 756}, {"hankel", len(ref.Hankel), 15}, {"forms", len(ref.Forms), 840},
		{"mass", len(ref.Mass), 15}, {"coupling", len(ref.Coupling), 80}, {"sound", len(ref.Sound), 24},
		{"gammaRatio", len(ref.GammaRatio), 10}, {"power", len(ref.Power), 36},
	} {
		if c.got != c.want {
			t.Fatalf("reference.json has %d rows of %s, want %d", c.got, c.name, c.want)
		}
	}
	return &ref
}

func edgeOf(v any) Edge {
	return map[string]Edge{"root": RootEdge, "held": HeldEdge, "clamped": ClampedEdge}[v.(string)]
}

func whole(v any) int { return int(v.(float64)) }

// ulps is the distance of got from want in units in the last place of want.
func ulps(got, want float64) float64 {
	if got == want {
		return 0
	}
	_, e := math.Frexp(want)
	return math.Abs(got-want) / math.Ldexp(1, max(e-53, -1074))
}
