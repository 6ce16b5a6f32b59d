package accuracy

import (
	"bufio"
	"compress/gzip"
	"fmt"
	"io/fs"
	"math"
	"math/big"
	"strconv"
	"strings"
)

// row is one line of a reference table. In the tables of zeros x is the number
// of the zero; in that of the annulus nu is the order, q the radius ratio.
type row struct {
	code     string
	nu, x, q float64
	v        []*big.Float
}

func (r row) whole() bool { return r.nu == math.Floor(r.nu) }
func (r row) n() int      { return int(r.x) }

// readTable reads one gzipped table; its first line is a comment.
func readTable(tables fs.FS, name string) ([]row, error) {
	f, err := tables.Open(name)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	z, err := gzip.NewReader(f)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	var rows []row
	s := bufio.NewScanner(z)
	for line := 1; s.Scan(); line++ {
		if strings.HasPrefix(s.Text(), "#") {
			continue
		}
		r, err := parseRow(s.Text(), name == "annulus.tsv.gz")
		if err != nil {
			return nil, fmt.Errorf("%s:%d: %w", name, line, err)
		}
		rows = append(rows, r)
	}
	return rows, s.Err()
}

func parseRow(text string, annular bool) (r row, err error) {
	fields := strings.Split(text, "\t")
	if len(fields) < 4 {
		return r, fmt.Errorf("has %d columns, at least 4 are needed", len(fields))
	}
	first := []*float64{&r.nu, &r.x}
	if annular {
		first = []*float64{&r.nu, &r.q, &r.x}
	} else {
		r.code, fields = fields[0], fields[1:]
	}
	for i, p := range first {
		if *p, err = strconv.ParseFloat(fields[i], 64); err != nil {
			return r, err
		}
	}
	for _, s := range fields[len(first):] {
		// 21 digits need 70 bits.
		v, _, err := big.ParseFloat(s, 10, 80, big.ToNearestEven)
		if err != nil {
			return r, fmt.Errorf("%q: %w", s, err)
		}
		r.v = append(r.v, v)
	}
	return r, nil
}
