package response

import (
	"math"
	"slices"
	"strings"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/disc"
	"hoopsheet/core/quantity"
)

const (
	// leastMeasured and MostMeasured points of a measured shape.
	leastMeasured = 6
	MostMeasured  = 4000
	// mostFitDegree of the polynomials of a fit.
	mostFitDegree = 14
	// farOff is how many times the usual misfit an outlier is off: of a normal
	// distribution 1 in 16,000 is.
	farOff = 4
	// nearRim is where the misfit at the rim is looked at.
	nearRim = 0.95
)

// measuredFit is a smooth shape, held at the rim, fitted to measured values.
type measuredFit struct {
	// rows by order: of the cosine and the sine.
	rows   [mostFitDegree + 1][2][mostFitDegree/2 + 1]float64
	degree int
	// Of the note.
	residual, rim, scale, largest float64
	outliers                      []int
	points                        int
}

// fitColumn is u_j of disc.HeldEdge of order m times cos or sin m theta.
type fitColumn struct {
	m, j int
	part disc.Part
}

// point is a measured value.
type point struct {
	r, theta, value float64
	line            int
}

// toSI reads a unit of a table; nil if there is none of that name.
func toSI(symbol string, dimensions ...quantity.Dimension) func(float64) float64 {
	if symbol == "" {
		return func(x float64) float64 { return x }
	}
	for _, d := range dimensions {
		if u, ok := quantity.Find(d, symbol); ok {
			return u.ToSI
		}
	}
	return nil
}

// readMeasured reads the table of a shape; radius is that of the ring, m.
func (s *Shape) readMeasured(prefix string, radius float64) ([]point, []diaphragm.Problem) {
	field := prefix + "table"
	toLength, toValue := toSI(s.PlaceUnit, quantity.Length), toSI(s.ValueUnit, quantity.Length, quantity.Speed, quantity.Pressure)
	if toLength == nil {
		return nil, refusal(prefix+"placeUnit", diaphragm.CodeChoice, -1, say("# is no unit of length.", quoted(s.PlaceUnit)))
	}
	if toValue == nil {
		return nil, refusal(prefix+"valueUnit", diaphragm.CodeChoice, -1, say("# is no unit of length, speed or pressure.", quoted(s.ValueUnit)))
	}
	table, problems := readTable(s.Table, field, 3, leastMeasured, MostMeasured)
	if problems != nil {
		return nil, problems
	}
	polar := len(table.header) > 1 && strings.HasPrefix(strings.ToLower(table.header[1]), "theta")
	list := make([]point, len(table.rows))
	for i, row := range table.rows {
		p := point{value: toValue(row[2]), line: table.lines[i]}
		x, y := toLength(row[0])/radius, toLength(row[1])/radius
		p.r, p.theta = math.Hypot(x, y), math.Atan2(y, x)
		if polar {
			p.r, p.theta = x, row[1]*math.Pi/180
		}
		if !(p.r >= 0 && p.r <= 1.02) || !(math.Abs(p.value) <= mostPeak) {
			return nil, refusal(field, diaphragm.CodeBounds, table.offsets[i],
				say("Line # of the table lies at # ring radii with the value #; a place must be within the ring and a value between -1,000,000 and 1,000,000.", p.line, p.r, p.value))
		}
		p.r = math.Min(p.r, 1)
		list[i] = p
	}
	return list, nil
}

// fitMeasured fits a shape, leaving out what lies far off.
func fitMeasured(list []point) *measuredFit {
	used := slices.Clone(list)
	var f *measuredFit
	for range 4 {
		f = newFit(used)
		// The usual misfit by the median, which outliers do not move; of a normal
		// distribution it is 0.6745 of the standard deviation.
		off := make([]float64, len(list))
		for i, p := range list {
			off[i] = math.Abs(p.value - f.At(p.r, p.theta))
			f.scale = math.Max(f.scale, math.Abs(p.value))
		}
		sorted := slices.Clone(off)
		slices.Sort(sorted)
		usual := math.Max(sorted[len(sorted)/2]/0.6745, 1e-9*f.scale)
		f.outliers = nil
		kept := make([]point, 0, len(list))
		var sum, rim float64
		atRim, offRim := 0, 0
		for i, p := range list {
			far := off[i] > farOff*usual
			if p.r > nearRim {
				atRim++
				rim = math.Max(rim, off[i])
			}
			if far {
				f.outliers = append(f.outliers, p.line)
				if p.r > nearRim {
					offRim++
				}
				continue
			}
			kept = append(kept, p)
			sum += off[i] * off[i]
			if p.r > nearRim {
				f.rim = math.Max(f.rim, off[i])
			}
		}
		// A single outlier says nothing of the rim, a third of the points there does.
		if 3*offRim >= atRim {
			f.rim = rim
		}
		f.residual, f.points = math.Sqrt(sum/float64(len(kept))), len(kept)
		if len(kept) == len(used) || len(kept) < leastMeasured {
			break
		}
		used = kept
	}
	return f
}

// newFit fits by least squares. Of the polynomial degrees that the points can
// tell apart it takes the one with the least estimate of the error of prediction,
// n RSS/(n - p)^2 of p functions and n points.
func newFit(list []point) *measuredFit {
	// Generalised cross-validation: Golub, Heath and Wahba, Technometrics 21
	// (1979) 215. Columns come in order of degree, so one orthogonalisation
	// (Gram and Schmidt, twice) serves all degrees.
	n := len(list)
	left := make([]float64, n)
	whole := 0.0
	for i, p := range list {
		left[i] = p.value
		whole += p.value * p.value
	}
	var columns []fitColumn
	var q, upper [][]float64 // orthogonal columns; the triangle by columns
	var along []float64
	best, taken, degree := math.Inf(1), 0, 0
degrees:
	for d := 0; d <= mostFitDegree && (d+1)*(d+2)/2 <= max(1, n/2); d++ {
		for m := d % 2; m <= d; m += 2 {
			for part := range parts(m) {
				c := fitColumn{m, (d - m) / 2, disc.Part(part)}
				v := make([]float64, n)
				for i, p := range list {
					v[i] = c.at(p.r, p.theta, make([]float64, c.j+1))
				}
				size := math.Sqrt(dotted(v, v))
				triangle := make([]float64, len(q)+1)
				for range 2 {
					for k, u := range q {
						s := dotted(u, v)
						triangle[k] += s
						for i := range v {
							v[i] -= s * u[i]
						}
					}
				}
				rest := math.Sqrt(dotted(v, v))
				if !(rest > 1e-6*size) {
					break degrees // the points do not tell it from those before
				}
				triangle[len(q)] = rest
				for i := range v {
					v[i] /= rest
				}
				s := dotted(v, left)
				for i := range left {
					left[i] -= s * v[i]
				}
				columns, q, upper, along = append(columns, c), append(q, v), append(upper, triangle), append(along, s)
			}
		}
		p := float64(len(columns))
		rss := dotted(left, left)
		if rss < 1e-24*whole {
			rss = 0
		}
		if score := float64(n) * rss / ((float64(n) - p) * (float64(n) - p)); score < 0.999*best {
			best, taken, degree = score, len(columns), d
		}
		if rss == 0 {
			break
		}
	}
	f := &measuredFit{degree: degree}
	for k := taken - 1; k >= 0; k-- {
		along[k] /= upper[k][k]
		for i := range k {
			along[i] -= upper[k][i] * along[k]
		}
		c := columns[k]
		f.rows[c.m][c.part][c.j] = along[k]
	}
	return f
}

func (c fitColumn) at(r, theta float64, work []float64) float64 {
	disc.HeldEdge.Shapes(work, c.m, r)
	sin, cos := math.Sincos(float64(c.m) * theta)
	if c.part == disc.Sin {
		cos = sin
	}
	return work[c.j] * cos
}

// At is the shape at a place.
func (f *measuredFit) At(r, theta float64) float64 {
	var work [mostFitDegree/2 + 1]float64
	sum := 0.0
	for m := 0; m <= f.degree; m++ {
		shapes := work[:(f.degree-m)/2+1]
		disc.HeldEdge.Shapes(shapes, m, math.Min(r, 1))
		sin, cos := math.Sincos(float64(m) * theta)
		sum += dotted(shapes, f.rows[m][0][:])*cos + dotted(shapes, f.rows[m][1][:])*sin
	}
	return sum
}

// report writes the note of the fit.
func (f *measuredFit) report(n *SourceNote, peak float64) {
	size := math.Abs(peak)
	n.Residual, n.RimMisfit, n.Outliers = size*f.residual, size*f.rim, f.outliers
	add := func(text string, parts ...any) { n.Notes = append(n.Notes, say(text, parts...)) }
	add("A smooth shape of degree #, zero at the rim, is fitted to # points by least squares; it misses them by # of the largest value (root mean square).",
		f.degree+2, f.points, percent(f.residual/math.Max(f.scale, 1e-300)))
	if len(f.outliers) > 0 {
		add("# points lie more than four times the usual misfit off and are left out of the fit.", len(f.outliers))
	}
	if f.rim > 3*f.residual && f.rim > 0.01*f.scale {
		add("Within a twentieth of the radius from the rim the values miss a sheet held at the rim by up to # of the largest: look at the zero of the measurement.", percent(f.rim/f.scale))
	}
	if f.largest > 1.5*f.scale {
		add("Between the points the shape swings to # times the largest measured value: measure where it does.", short2(f.largest/f.scale))
	}
}
