package modes

import (
	"math"
	"testing"

	"hoopsheet/core/bessel"
)

// lambda2 returns omega a^2 sqrt(sigma/D) = alpha beta.
func lambda2(alpha, s float64) float64 { return alpha * math.Sqrt(alpha*alpha+s) }

// omega a^2 sqrt(sigma/D) of plates without tension, n = 1 to 4. Clamped:
// Leissa, Vibration of Plates, NASA SP-160 (1969), Table 2.1. Supported: Leissa
// & Narita, J. Sound Vib. 70 (1980) 221-229; the older table in SP-160 labelled
// nu = 0.3 belongs to nu near 1/3. Both recomputed with mpmath at 30 digits from
// the exact determinant.
var publishedPlates = []struct {
	rim     Rim
	nu      float64
	m       int
	lambda2 [4]float64
}{
	{RimClamped, 0, 0, [4]float64{10.2158262299, 39.7711482365, 89.104143974, 158.184215146}},
	{RimClamped, 0, 1, [4]float64{21.2603976946, 60.82867182, 120.079236583, 199.053378552}},
	{RimClamped, 0, 2, [4]float64{34.8770354203, 84.5826495515, 153.815084911, 242.7205551}},
	{RimClamped, 0, 3, [4]float64{51.0300354838, 111.021411877, 190.303779572, 289.179894192}},
	{RimClamped, 0, 4, [4]float64{69.6658306968, 140.107903827, 229.518563911, 338.411234478}},
	{RimClamped, 0, 5, [4]float64{90.7389863174, 171.802983557, 271.428181055, 390.389494283}},
	{RimSupported, 0, 0, [4]float64{4.443613935, 29.3637695925, 73.8228897296, 137.994589637}},
	{RimSupported, 0, 3, [4]float64{39.6031158763, 94.2183498435, 168.353130671, 262.167731605}},
	{RimSupported, 0.3, 0, [4]float64{4.93514904257, 29.7200047321, 74.1560554365, 138.318122011}},
	{RimSupported, 0.3, 1, [4]float64{13.898165073, 48.4789281762, 102.773345785, 176.801242118}},
	{RimSupported, 0.3, 2, [4]float64{25.6132967208, 70.1170384399, 134.297823902, 218.202590192}},
	{RimSupported, 0.3, 3, [4]float64{39.9573141178, 94.5489776718, 168.674916686, 262.484744362}},
	{RimSupported, 0.5, 0, [4]float64{5.21265396919, 29.9455758012, 74.3713717192, 138.529054089}},
	{RimSupported, 0.5, 3, [4]float64{40.1818709998, 94.7631251459, 168.88504226, 262.692675592}},
}

// Plates under tension: s = T a^2/D, omega a^2 sqrt(sigma/D) of n = 1 and 2.
// The case of Wah, J. Acoust. Soc. Am. 34 (1962) 275-281; digits by mpmath from
// the exact determinant, checked there by a polynomial Ritz method.
var publishedTension = []struct {
	rim     Rim
	s       float64
	m       int
	lambda2 [2]float64
}{
	{RimClamped, 1, 0, [2]float64{10.5490120744, 40.1892433826}},
	{RimClamped, 1, 1, [2]float64{21.6516455798, 61.2635220445}},
	{RimClamped, 14.68, 2, [2]float64{40.5722658979, 90.9059721065}},
	{RimClamped, 100, 0, [2]float64{27.4834947846, 69.9003238716}},
	{RimClamped, 1000, 1, [2]float64{126.047778615, 234.702324698}},
	{RimClamped, 1e4, 2, [2]float64{519.435149752, 853.241881557}},
	{RimClamped, 1e6, 0, [2]float64{2407.23975362, 5525.68792754}},
	{RimClamped, 1e6, 2, [2]float64{5140.83087652, 8425.96837786}},
	{RimSupported, 10, 0, [2]float64{9.07316829634, 34.467868779}},
	{RimSupported, 50, 1, [2]float64{30.4591717373, 69.3640810167}},
	{RimSupported, 500, 2, [2]float64{117.66462866, 200.855708887}},
	{RimSupported, 1e4, 0, [2]float64{240.535137236, 552.809340237}},
	{RimSupported, 1e6, 0, [2]float64{2404.83082691, 5520.15834482}},
	{RimSupported, 1e6, 2, [2]float64{5135.68642902, 8417.53642}},
}

func TestStiffPublished(t *testing.T) {
	// Half a unit of the last printed of at least ten digits.
	const relative = 5e-10
	for _, c := range publishedPlates {
		for i, alpha := range StiffRoots(make([]float64, 4), c.m, 0, c.nu, c.rim) {
			if got := lambda2(alpha, 0); math.Abs(got-c.lambda2[i]) > relative*got {
				t.Errorf("%s plate, nu %v, (%d,%d): %.12g, want %.12g", c.rim, c.nu, c.m, i+1, got, c.lambda2[i])
			}
		}
	}
	for _, c := range publishedTension {
		for i, alpha := range StiffRoots(make([]float64, 2), c.m, c.s, 0.3, c.rim) {
			if got := lambda2(alpha, c.s); math.Abs(got-c.lambda2[i]) > relative*got {
				t.Errorf("%s, s %v, (%d,%d): %.12g, want %.12g", c.rim, c.s, c.m, i+1, got, c.lambda2[i])
			}
		}
	}
}

// stiffness spans from plate to film.
var stiffnesses = []float64{0, 1e-9, 1e-3, 1, 30, 1e3, 1e5, 1e7, 1e9}

func TestStiffCount(t *testing.T) {
	// Every root up to the last, by the sign of the equation on a grid of 40
	// points to each interval between zeros of J_m, poles left out by testing
	// the equation times J_m.
	for _, rim := range Rims() {
		for _, s := range stiffnesses {
			for _, m := range []int{0, 1, 2, 7, 20} {
				const count = 20
				roots := StiffRoots(make([]float64, count), m, s, 0.3, rim)
				zeros := bessel.ZerosJ(make([]float64, count+1), float64(m))
				equation := func(alpha float64) float64 {
					beta := math.Sqrt(alpha*alpha + s)
					right := beta * bessel.RatioI(float64(m), beta)
					if rim == RimSupported {
						right -= (alpha*alpha + beta*beta) / (1 - 0.3)
					}
					return alpha*bessel.JPrime(float64(m), alpha) - right*bessel.JInt(m, alpha)
				}
				changes := 0
				last := (roots[count-1] + zeros[count]) / 2
				if rim == RimSupported {
					last = zeros[count-1] // the sign here is that of J_m'
				}
				before := equation(0.05 * zeros[0])
				for i := range count {
					lo := 0.05 * zeros[0]
					if i > 0 {
						lo = zeros[i-1]
					}
					for k := 1; k <= 40; k++ {
						now := equation(lo + (zeros[i]-lo)*float64(k)/40)
						if (now > 0) != (before > 0) {
							changes++
						}
						before = now
					}
				}
				if now := equation(last); (now > 0) != (before > 0) {
					changes++
				}
				// At zeros[i] both forms have the sign of J_m'(zero): a clamped
				// root beyond the last zero is the one change more.
				if changes != count {
					t.Errorf("%s, s %v, m %d: %d roots, want %d", rim, s, m, changes, count)
				}
				for i, alpha := range roots {
					if i > 0 && !(alpha > roots[i-1]) {
						t.Errorf("%s, s %v, m %d: root %d is not above the one before", rim, s, m, i)
					}
					if above := equation(alpha * (1 + 4e-15)); above != 0 && (above > 0) == (equation(alpha*(1-4e-15)) > 0) {
						t.Errorf("%s, s %v, m %d: no sign change within 4e-15 of root %d, %v", rim, s, m, i, alpha)
					}
				}
			}
		}
	}
}

func TestStiffAsymptotics(t *testing.T) {
	// For e = s^(-1/2) small, clamped f/f_ideal = 1 + e + e^2 (1 + j^2/2) +
	// O(e^3 j^2), supported 1 + (j^2 - 2(1-nu))/(2s) + O(s^-3/2 + j^4/s^2): derived from the
	// exact equation, with beta I'/I = sqrt(s) - 1/2 + ... The bounds take ten
	// times the first terms left out.
	for _, m := range []int{0, 1, 5, 20} {
		for _, s := range []float64{1e6, 1e8, 1e9} {
			zeros := bessel.ZerosJ(make([]float64, 5), float64(m))
			e := 1 / math.Sqrt(s)
			for i, alpha := range StiffRoots(make([]float64, 5), m, s, 0.3, RimClamped) {
				j := zeros[i]
				got := alpha / j * math.Sqrt(1+alpha*alpha/s)
				want := 1 + e + e*e*(1+j*j/2)
				if math.Abs(got-want) > 1e-14+10*e*e*e*(1+j*j) {
					t.Errorf("clamped s %v (%d,%d): %.15g, want %.15g", s, m, i+1, got, want)
				}
			}
			for i, alpha := range StiffRoots(make([]float64, 5), m, s, 0.3, RimSupported) {
				j := zeros[i]
				got := alpha / j * math.Sqrt(1+alpha*alpha/s)
				want := 1 + (j*j-2*(1-0.3))/(2*s)
				if math.Abs(got-want) > 1e-14+10*(e*e*e+j*j*j*j/(s*s)) {
					t.Errorf("supported s %v (%d,%d): %.15g, want %.15g", s, m, i+1, got, want)
				}
			}
		}
	}
}

func TestStiffIdealLimit(t *testing.T) {
	for _, rim := range Rims() {
		for m := range 3 {
			zeros := bessel.ZerosJ(make([]float64, 4), float64(m))
			for i, alpha := range StiffRoots(make([]float64, 4), m, math.Inf(1), 0.3, rim) {
				if alpha != zeros[i] {
					t.Errorf("%s (%d,%d): %v, want j = %v", rim, m, i+1, alpha, zeros[i])
				}
			}
		}
	}
}
