package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

var someShapes = []struct {
	m, n        int
	orientation float64
}{
	{0, 1, 0}, {0, 3, 1}, {1, 1, 0}, {1, 2, 0.7}, {2, 1, -2.5}, {5, 4, 100}, {40, 2, 0.01},
}

func TestRasterAgainstDirectValues(t *testing.T) {
	const size = 33
	dst := make([]float32, size*size)
	for _, c := range someShapes {
		s := NewShape(c.m, c.n, c.orientation)
		s.Raster(dst, size)
		for i, got := range dst {
			x := float64(2*(i%size)-size+1) / size
			y := float64(size-1-2*(i/size)) / size
			r := math.Hypot(x, y)
			if r > 1 {
				if !math.IsNaN(float64(got)) {
					t.Fatalf("(%d,%d) has %v outside the disc", c.m, c.n, got)
				}
				continue
			}
			want := s.At(r, math.Atan2(y, x))
			// 6e-8 of float32 beside 1e-7 of the interpolation.
			if math.Abs(float64(got)-want) > 1.6e-7 {
				t.Fatalf("(%d,%d) at %v, %v: %v, want %v", c.m, c.n, x, y, got, want)
			}
		}
	}
}

func TestSectionAgainstDirectValues(t *testing.T) {
	for _, c := range someShapes {
		s := NewShape(c.m, c.n, c.orientation)
		for _, points := range []int{2, 3, 40, 41} {
			dst := make([]float32, points)
			const angle = 0.4
			s.Section(dst, angle)
			for i, got := range dst {
				place := -1 + 2*float64(i)/float64(points-1)
				theta := angle
				if place < 0 {
					theta += math.Pi
				}
				if want := s.At(math.Abs(place), theta); math.Abs(float64(got)-want) > 1e-7 {
					t.Fatalf("(%d,%d) point %d of %d: %v, want %v", c.m, c.n, i, points, got, want)
				}
			}
		}
	}
}

// slopes returns the derivatives of a shape in r and theta.
func slopes(s *Shape, r, theta float64) (dr, dtheta float64) {
	m := float64(s.M)
	turn := m * (theta - s.Orientation)
	dr = s.scale * s.Zero * bessel.JPrime(m, s.Zero*r) * math.Cos(turn)
	return dr, -s.scale * bessel.JInt(s.M, s.Zero*r) * m * math.Sin(turn)
}

func TestLobesAreExtremes(t *testing.T) {
	for _, c := range someShapes {
		s := NewShape(c.m, c.n, c.orientation)
		lobes := s.Lobes()
		if want := max(1, 2*c.m) * c.n; len(lobes) != want {
			t.Fatalf("(%d,%d) has %d lobes, want %d", c.m, c.n, len(lobes), want)
		}
		largest := 0.0
		for _, lobe := range lobes {
			if got := s.At(lobe.Radius, lobe.Angle); math.Abs(got-lobe.Value) > 1e-13 {
				t.Errorf("(%d,%d) at its lobe is %v, lobe says %v", c.m, c.n, got, lobe.Value)
			}
			// The place of an extreme is known to a few units in the last place
			// of r and theta; the curvature is at most zero^2 and m^2, and an
			// angle of 100 rad keeps 1e-14.
			dr, dtheta := slopes(s, lobe.Radius, lobe.Angle)
			bound := 1e-13 * (s.Zero*s.Zero + float64(c.m*c.m))
			if math.Abs(dr) > bound || math.Abs(dtheta) > bound {
				t.Errorf("(%d,%d) slopes at a lobe %v, %v", c.m, c.n, dr, dtheta)
			}
			largest = math.Max(largest, math.Abs(lobe.Value))
		}
		if math.Abs(largest-1) > 1e-14 {
			t.Errorf("(%d,%d) is scaled to %v", c.m, c.n, largest)
		}
	}
}

func TestNodalLinesAreNodes(t *testing.T) {
	for _, c := range someShapes {
		s := NewShape(c.m, c.n, c.orientation)
		circles := s.CircleRadii()
		if circles == nil || len(circles) != c.n-1 {
			t.Errorf("(%d,%d) has circles %v", c.m, c.n, circles)
		}
		for _, r := range circles {
			if got := s.At(r, s.Orientation); math.Abs(got) > 1e-13*s.Zero {
				t.Errorf("(%d,%d) on its circle is %v", c.m, c.n, got)
			}
		}
		angles := s.DiameterAngles()
		if angles == nil || len(angles) != c.m {
			t.Errorf("(%d,%d) has diameters %v", c.m, c.n, angles)
		}
		for i, angle := range angles {
			if angle < 0 || angle >= math.Pi || i > 0 && angle <= angles[i-1] {
				t.Errorf("(%d,%d) diameters %v are not in order within 0 to pi", c.m, c.n, angles)
			}
			if got := s.At(s.turns[0]/s.Zero, angle); math.Abs(got) > 1e-13*(1+math.Abs(c.orientation))*float64(c.m) {
				t.Errorf("(%d,%d) on its diameter is %v", c.m, c.n, got)
			}
		}
	}
}

func BenchmarkRaster(b *testing.B) {
	s := NewShape(5, 4, 0.3)
	dst := make([]float32, 256*256)
	for b.Loop() {
		s.Raster(dst, 256)
	}
}
