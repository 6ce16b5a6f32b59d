// Package accuracy measures core/bessel against reference values computed to
// 40 digits, region by region. The tests hold each region to its promise and
// the site publishes the same numbers.
package accuracy

import (
	"io/fs"
	"math"
	"math/big"
)

// Region is one line of the accuracy table.
//
// Errors are in ulp of the reference value or, where the function oscillates
// (x >= nu), of the envelope sqrt(J^2 + Y^2) if that is larger. For the annulus
// they are divided by max(1, q/(1-q)), by which a root magnifies a rounding of
// the radius ratio q.
type Region struct {
	Region  string  `json:"region"`  // function and where it was sampled
	Points  int     `json:"points"`  // number of reference values
	MeanULP float64 `json:"meanUlp"` // mean error
	MaxULP  float64 `json:"maxUlp"`  // largest error
	WhereNu float64 `json:"whereNu"` // order of the largest error
	WhereX  float64 `json:"whereX"`  // argument, or number of the zero, there
	Promise float64 `json:"promise"` // largest error the package promises
}

// Measure computes the table from the reference files in tables, the folder
// testdata/bessel. Only every stride-th row is used; 1 uses all.
func Measure(tables fs.FS, stride int) ([]Region, error) {
	var out []Region
	for _, t := range []struct {
		file   string
		points []probe
	}{
		{"jy.tsv.gz", cylinder},
		{"ik.tsv.gz", modified},
		{"zeros.tsv.gz", zeros},
		{"annulus.tsv.gz", annulus},
	} {
		rows, err := readTable(tables, t.file)
		if err != nil {
			return nil, err
		}
		for _, p := range t.points {
			out = append(out, p.measure(rows, stride))
		}
	}
	return out, nil
}

// probe is one region: which rows belong to it and what is compared there.
type probe struct {
	name    string
	promise float64
	in      func(r row) bool
	got     func(r row) float64
	want    func(r row) *big.Float
	// scale, if set, returns a magnitude whose ulp is used when it exceeds
	// that of the reference value.
	scale func(r row) float64
	// amplify, if set, returns the factor by which the problem itself
	// magnifies a rounding of its data; errors are divided by it.
	amplify func(r row) float64
}

func (p probe) measure(rows []row, stride int) Region {
	out := Region{Region: p.name, Promise: p.promise}
	var sum float64
	kept := 0
	for _, r := range rows {
		if p.in != nil && !p.in(r) {
			continue
		}
		kept++
		if (kept-1)%stride != 0 {
			continue
		}
		var scale float64
		if p.scale != nil {
			scale = p.scale(r)
		}
		e := errorULP(p.got(r), p.want(r), scale)
		if p.amplify != nil {
			e /= p.amplify(r)
		}
		out.Points++
		sum += e
		if !(e <= out.MaxULP) {
			out.MaxULP, out.WhereNu, out.WhereX = e, r.nu, r.x
		}
	}
	if out.Points > 0 {
		out.MeanULP = sum / float64(out.Points)
	}
	return out
}

// errorULP returns |got - want| in ulp of the larger of |want| and scale. A
// value beyond the range of float64 must be answered by an infinity of its
// sign, one below it by a number within the smallest subnormals.
func errorULP(got float64, want *big.Float, scale float64) float64 {
	nearest, _ := want.Float64()
	if math.IsInf(nearest, 0) {
		if got == nearest {
			return 0
		}
		return math.Inf(1)
	}
	if math.IsNaN(got) || math.IsInf(got, 0) {
		return math.Inf(1)
	}
	d := new(big.Float).SetPrec(200).SetFloat64(got)
	d.Sub(d, want)
	diff, _ := d.Float64()
	return math.Abs(diff) / ulp(math.Max(math.Abs(nearest), scale))
}

// ulp returns the distance from v >= 0 to the next larger float64.
func ulp(v float64) float64 {
	return math.Nextafter(v, math.Inf(1)) - v
}
