package response

import (
	"math"
	"testing"
)

func TestSpectrumOfASwing(t *testing.T) {
	const n, step, f, amplitude = 1000, 0.01, 12.34, 0.25
	values := make([]float32, n)
	for i := range values {
		values[i] = float32(3 + amplitude*math.Cos(2*math.Pi*f*float64(i)*step+0.7))
	}
	spectrum, between := spectrumOf(values, step)
	best := 1
	for k := range spectrum {
		if k > 0 && spectrum[k] > spectrum[best] {
			best = k
		}
	}
	// A Hann window twice padded is read at most a quarter of 1/(n step) from the
	// top of its line, where it is at 1 - 0.0404 (Harris, Proc. IEEE 66 (1978) 51,
	// from memory: sinc(x)/(1-x^2) at x = 1/4 is 0.9603); its sidelobes about 0 and
	// the mean are below 1e-3 there.
	if math.Abs(float64(best)*between-f) > between/2*1.01 {
		t.Errorf("line at %v Hz", float64(best)*between)
	}
	if a := float64(spectrum[best]); a > amplitude*1.001 || a < amplitude*(0.9603-0.001) {
		t.Errorf("amplitude %v", a)
	}
	// The mean of 123.4 periods: a tenth of the swing over 2 pi 123.4 at the most.
	if a := float64(spectrum[0]); math.Abs(a-3) > amplitude/(math.Pi*123.4) {
		t.Errorf("mean %v", a)
	}
	if spectrum, _ := spectrumOf(values[:1], step); spectrum != nil {
		t.Error("a spectrum of one value")
	}
}

func TestEnergyDown(t *testing.T) {
	// Of one mode the amplitude falls like exp(-zeta omega t), so the energy takes
	// L ln(10)/(20 zeta omega), but for the swing of the energy's fall within half a
	// period, which is below 2 zeta of itself: zeta/(zeta omega) in time.
	c := struckCase(0, 1, Source{Kind: SourceVelocity, At: 0.4, Shape: Shape{Kind: ShapeBulge, Peak: 1}})
	for _, zeta := range []float64{0.002, 0.05} {
		c.Zeta = zeta
		mo := started(t, c).moves
		omega := mo.fastest()
		for _, level := range []float64{20, 60, 90} {
			got, want := mo.energyDown(level), level*math.Ln10/(20*zeta*omega)
			if math.Abs(got-want) > 1.1/omega {
				t.Errorf("zeta %v, %v dB: %v, want %v", zeta, level, got, want)
			}
		}
	}
	c.Zeta = 0
	if got := started(t, c).moves.energyDown(60); got != 0 {
		t.Errorf("without damping %v", got)
	}
	c.Zeta = 0.01
	c.Sources = []Source{{Kind: SourcePressure, Shape: Shape{Kind: ShapeEven, Peak: 1}, Pulse: &Pulse{Kind: PulseStep}}}
	if got := started(t, c).moves.energyDown(60); got != 0 {
		t.Errorf("under a load that stays %v", got)
	}
}

func TestModesOfAPoint(t *testing.T) {
	// Released from the bulge, a_n = 8/(j^3 J_1(j)) moves the centre: the first
	// share is a_1 over the sum of |a_n|.
	c := struckCase(3, 20, Source{Kind: SourceDisplacement, Shape: Shape{Kind: ShapeBulge, Peak: 1}})
	c.Points = []Point{{0, 0}, {1, 0}}
	m := respond(t, c)
	var first, sum float64
	b := basisOf(3, 20)
	for n := 1; n <= 20; n++ {
		j := b.Zero(0, n)
		a := math.Abs(8 / (j * j * j * b.Slope(0, n)))
		if sum += a; n == 1 {
			first = a
		}
	}
	got := m.Spots[0].Modes
	if len(got) != 5 || got[0].M != 0 || got[0].N != 1 || math.Abs(got[0].Share-first/sum) > 1e-12 {
		t.Errorf("%+v, want %v", got, first/sum)
	}
	if math.Abs(got[0].Frequency-b.Zero(0, 1)/(2*math.Pi)) > 1e-12 {
		t.Errorf("frequency %v", got[0].Frequency)
	}
}
