package response

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"os"
	"slices"
	"strings"
	"testing"
)

// respond computes a case that has no problems.
func respond(t *testing.T, c *Case) *Motion {
	t.Helper()
	m, problems, err := Respond(context.Background(), c, func(float64) {})
	if err != nil || len(problems) > 0 {
		t.Fatal(problems, err)
	}
	return m
}

func TestReference(t *testing.T) {
	// scipy: zeros, brute quadrature of the shapes, matrix exponential; see
	// reference.py. Its rule leaves 1e-10 at the third-order kink of a bump's
	// edge: steps of 1/1536 turn or a panel of 1/192 to the power four.
	data, err := os.ReadFile("../../testdata/response/reference.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Orders, Circles int
		Cases           []struct {
			Zeta                   float64
			Displacement, Velocity Shape
			Points                 []struct{ R, Theta, T, W float64 }
		}
	}
	if err := json.Unmarshal(data, &file); err != nil {
		t.Fatal(err)
	}
	if len(file.Cases) != 5 {
		t.Fatalf("%d cases", len(file.Cases))
	}
	for _, c := range file.Cases {
		mo := series(t, file.Orders, file.Circles, c.Zeta, c.Displacement, c.Velocity)
		for _, p := range c.Points {
			got := mo.probe(p.R*math.Cos(p.Theta), p.R*math.Sin(p.Theta), p.T).w
			// A formula may have a kink at the centre, x*(1 - r), which the
			// radial rule sees with an error near 1/p^5 of its p > 20 points.
			within := 1e-10
			if strings.Contains(c.Displacement.Formula+c.Velocity.Formula, "(1 - r)") {
				within = 3e-7
			}
			if math.Abs(got-p.W) > within {
				t.Errorf("zeta %v, %v at r %v, theta %v, t %v: %.14g, reference %.14g", c.Zeta, c.Displacement, p.R, p.Theta, p.T, got, p.W)
			}
		}
	}
}

func TestFramesAndHistories(t *testing.T) {
	c := benchCase()
	c.Frames, c.Radii, c.Angles = 13, 9, 40
	m := respond(t, c)
	begin, _ := c.start()
	unit := c.Sheet.Radius / c.Sheet.WaveSpeed()
	largest := 0.0
	for f, at := range m.Times {
		if want := c.Duration * float64(f) / 12; math.Abs(float64(at)-want) > 1e-7 {
			t.Errorf("frame %d at %v, want %v", f, at, want)
		}
		for j := range c.Radii {
			for i := range c.Angles {
				r, theta := float64(j)/8, 2*math.Pi*float64(i)/40
				got := m.Values[(f*c.Radii+j)*c.Angles+i]
				if math.Abs(float64(got)) > float64(m.Envelope[j*c.Angles+i]) {
					t.Fatalf("the envelope lies below frame %d at %v, %v", f, r, theta)
				}
				largest = math.Max(largest, math.Abs(float64(got)))
				if (i+j+f)%11 != 0 {
					continue
				}
				want := begin.moves.probe(r*math.Cos(theta), r*math.Sin(theta), c.Duration*float64(f)/12/unit).w
				// Values of at most 5e-3 as float32.
				if math.Abs(float64(got)-want) > 3e-10 {
					t.Fatalf("frame %d at %v, %v: %v, want %v", f, r, theta, got, want)
				}
			}
		}
	}
	if got := math.Abs(m.Travel.Displacement); got < largest*(1-1e-7) {
		t.Errorf("travel %v, a frame shows %v", got, largest)
	}
	if len(m.Histories) != len(c.Points) {
		t.Fatalf("%d histories", len(m.Histories))
	}
	count := len(m.HistoryTimes)
	// The fastest of a blow with a sharp edge all count, those of 1 % apart.
	if fastest := begin.moves.slowerThan(finerShare) / unit; fastest < 0.6*begin.moves.fastest()/unit || float64(count-1) < 8*fastest*c.Duration/(2*math.Pi) {
		t.Errorf("%d instants are too few", count)
	}
	for i, p := range c.Points {
		for k := 0; k < count; k += 197 {
			at := c.Duration * float64(k) / float64(count-1) / unit
			want := begin.moves.probe(p.Radius*math.Cos(p.Angle), p.Radius*math.Sin(p.Angle), at).w
			if got := float64(m.Histories[i][k]); math.Abs(got-want) > 3e-10 {
				t.Fatalf("point %d, instant %d: %v, want %v", i, k, got, want)
			}
		}
	}
}

func TestTravelDoesNotDependOnTheGrid(t *testing.T) {
	for name, change := range map[string]func(*Case){
		"bump and patch": func(*Case) {},
		"patch only":     func(c *Case) { c.Displacement = Shape{Kind: ShapeRest}; c.Zeta = 0 },
		"bulge": func(c *Case) {
			c.Displacement, c.Velocity = Shape{Kind: ShapeBulge, Peak: -0.01}, Shape{Kind: ShapeRest}
		},
		"pull": func(c *Case) { c.Displacement.Kind = ShapePoint; c.Velocity.Peak = 0; c.Zeta = 0 },
	} {
		var first Travel
		for i, grid := range [][3]int{{2, 2, 36}, {120, 40, 80}, {300, 33, 128}} {
			c := benchCase()
			change(c)
			c.Frames, c.Radii, c.Angles = grid[0], grid[1], grid[2]
			m := respond(t, c)
			got := m.Travel
			if i == 0 {
				first = got
				continue
			}
			// The last step of the refinement leaves 1e-10 of the place, the
			// square of that in the value.
			if math.Abs(got.Displacement-first.Displacement) > 1e-12*math.Abs(first.Displacement) ||
				math.Abs(got.Time-first.Time) > 1e-8 || math.Abs(got.At.Radius-first.At.Radius) > 1e-7 {
				t.Errorf("%s, grid %v: %+v, before %+v", name, grid, got, first)
			}
		}
	}
}

func TestTravelAgainstDenseSearch(t *testing.T) {
	// Every place on a fine grid at closely spaced instants; nothing may exceed
	// the travel found.
	c := benchCase()
	c.Zeta, c.Orders, c.Circles = 0, 8, 8
	c.Displacement = Shape{Kind: ShapeRest}
	c.Frames, c.Radii, c.Angles = 1200, 65, 90
	c.Points = nil
	c.Duration = 0.2
	m := respond(t, c)
	largest := 0.0
	for _, w := range m.Values {
		largest = math.Max(largest, math.Abs(float64(w)))
	}
	found := math.Abs(m.Travel.Displacement)
	// The grid's steps of at most 1/65 and 0.0085 a/c show a top of curvature
	// below omega^2 = 37^2 within (37/65)^2/8 and (37*0.0085)^2/8 of its height.
	if largest > found*(1+1e-7) || largest < found*0.94 {
		t.Errorf("travel %v, dense grid %v", found, largest)
	}
}

func TestShares(t *testing.T) {
	c := benchCase()
	c.Velocity = Shape{Kind: ShapeRest}
	c.Displacement = Shape{Kind: ShapeBulge, Peak: 0.002}
	m := respond(t, c)
	// The potential of a bulge is T/2 2 pi peak^2, of which mode (0,1) carries
	// 32/j^4: with Rayleigh's sum over n of j^-4 = 1/32 that makes one.
	if want := 200.0 / 2 * 2 * math.Pi * 0.002 * 0.002; math.Abs(m.Energy-want) > 1e-14*want {
		t.Errorf("energy %v, want %v", m.Energy, want)
	}
	j := 2.404825557695773
	if got, want := m.Strongest[0].Share, 32/(j*j*j*j); math.Abs(got-want) > 1e-14 {
		t.Errorf("share of (0,1) %v, want %v", got, want)
	}
	sum := 0.0
	for n := 1; n <= 16; n++ {
		z := basisOf(0, 16).Zero(0, n)
		sum += 32 / (z * z * z * z)
	}
	if math.Abs(m.MissedDisplacement-(1-sum)) > 1e-14 || m.MissedVelocity != 0 || m.MissedEnergy != m.MissedDisplacement {
		t.Errorf("missed %v %v %v, want %v", m.MissedDisplacement, m.MissedVelocity, m.MissedEnergy, 1-sum)
	}
	// A struck patch is v0 over b: sigma/2 pi b^2 a^2 v0^2.
	c = benchCase()
	c.Displacement = Shape{Kind: ShapeRest}
	m = respond(t, c)
	a, b := c.Sheet.Radius, c.Velocity.Width
	if want := c.Sheet.ArealDensity / 2 * math.Pi * b * b * a * a * 0.25; math.Abs(m.Energy-want) > 1e-13*want {
		t.Errorf("energy %v, want %v", m.Energy, want)
	}
	// Ring-down: a thousandth after ln(1000)/(zeta omega).
	if want := math.Log(1000) / (0.01 * 2 * math.Pi / m.Period); math.Abs(m.RingDown-want) > 1e-13*want {
		t.Errorf("ring-down %v, want %v", m.RingDown, want)
	}
}

func TestFormulaIsTheShapeItWrites(t *testing.T) {
	write := benchCase()
	write.Displacement = Shape{Kind: ShapeFormula, Peak: 0.004, Formula: "1 - x^2 - y^2"}
	choose := benchCase()
	choose.Displacement = Shape{Kind: ShapeBulge, Peak: 0.004}
	a, b := respond(t, write), respond(t, choose)
	if math.Abs(a.Energy-b.Energy) > 1e-9*b.Energy {
		t.Errorf("energies %v and %v", a.Energy, b.Energy)
	}
	if math.Abs(a.Travel.Displacement-b.Travel.Displacement) > 1e-12 {
		t.Errorf("travels %v and %v", a.Travel, b.Travel)
	}
	// The formula's slope comes from differences, good to 1e-10.
	if math.Abs(a.MissedDisplacement-b.MissedDisplacement) > 1e-9 {
		t.Errorf("missed %v and %v", a.MissedDisplacement, b.MissedDisplacement)
	}
}

func TestRest(t *testing.T) {
	c := benchCase()
	c.Displacement, c.Velocity = Shape{Kind: ShapeRest}, Shape{Kind: ShapeBump, Radius: 0.2, Width: 0.2}
	m := respond(t, c)
	if m.Travel != (Travel{}) || m.Energy != 0 || m.MissedEnergy != 0 || len(m.Strongest) != 0 || len(m.Warnings) != 0 {
		t.Errorf("at rest: %+v %v %v %v %v", m.Travel, m.Energy, m.MissedEnergy, m.Strongest, m.Warnings)
	}
	for _, w := range m.Values {
		if w != 0 {
			t.Fatal("the sheet moves")
		}
	}
}

func TestRespondStops(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	calls := 0
	_, _, err := Respond(ctx, benchCase(), func(share float64) {
		if calls++; calls == 3 {
			stop()
		}
	})
	if !errors.Is(err, context.Canceled) {
		t.Errorf("error %v", err)
	}
	if calls > 4 {
		t.Errorf("%d reports after the stop", calls-3)
	}
}

func TestProgressRises(t *testing.T) {
	before := 0.0
	_, _, err := Respond(context.Background(), benchCase(), func(share float64) {
		if share < before || share > 1 {
			t.Errorf("progress %v after %v", share, before)
		}
		before = share
	})
	if err != nil || before != 1 {
		t.Errorf("ends at %v, error %v", before, err)
	}
}

func TestFrameDoesNotAllocate(t *testing.T) {
	c := benchCase()
	begin, _ := c.start()
	table := takeTable(begin.moves.basis, []float64{0, 0.5, 1}, 80)
	walk, values := newWalk(begin.moves, 0.3), make([]float64, table.Len())
	p := &pictures{motion: make([]float32, 7*table.Len()), envelope: make([]float32, table.Len())}
	frame := -1
	if n := testing.AllocsPerRun(5, func() {
		walk.next()
		table.Synthesise(values, walk.coef)
		frame++
		p.take(p.motion[frame*len(values):], values)
		if frame > 1 {
			crest(p.envelope, p.motion, p.motion[len(values):], p.motion[2*len(values):])
		}
		steepestOf(values, table.R, 80)
	}); n != 0 {
		t.Errorf("%v allocations a frame", n)
	}
}

func TestRespondTwiceAtOnce(t *testing.T) {
	// Kept tables have work space that two computations must not share.
	want := respond(t, benchCase())
	results := make(chan *Motion)
	for range 3 {
		go func() {
			m, _, _ := Respond(context.Background(), benchCase(), func(float64) {})
			results <- m
		}()
	}
	for range 3 {
		m := <-results
		if m == nil || m.Travel != want.Travel || !slices.Equal(m.Values, want.Values) {
			t.Error("computations at once disturb each other")
		}
	}
}
