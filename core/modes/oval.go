package modes

import (
	"math"

	"hoopsheet/core/disc"
)

// Oval is the shape of a ring with semi-axes a (1 + Half) and a (1 - Half).
type Oval struct {
	// Half is the half difference of the semi-axes over their mean a, the radius
	// of the diaphragm.
	Half float64
	// Angle of the long axis, rad.
	Angle float64
}

// MaxOval is the largest Half that is taken.
const MaxOval = 0.3

// An ellipse is stretched to the disc, x = a (1 + h) X, y = a (1 - h) Y. All
// energies then carry the factor 1 - h^2, which is left out. What remains is
// exact:
//
//	tension    N_XX = T/(1+h)^2, N_YY = T/(1-h)^2
//	sheet      as on the disc
//	fluid      the wave number k in its symbol becomes K s(phi),
//	           s^2 = cos^2 phi/(1+h)^2 + sin^2 phi/(1-h)^2
//
// so the dry sheet is a disc with another tension along either axis. An uneven
// field is taken as it stands in X and Y, which leaves out products of it with h.

// field returns the tension on the disc, over T.
func (o Oval) field() Field {
	if o.Half == 0 {
		return nil
	}
	along, across := 1/square(1+o.Half), 1/square(1-o.Half)
	mean, half := (along+across)/2, (along-across)/2
	return append(WarpWeft(half, o.Angle), Part{RR: mean - 1, TT: mean - 1})
}

func square(x float64) float64 { return x * x }

// harmonics returns g_0, g_2, g_4, .. of s(phi)^power = sum g_2l cos 2l phi.
func (o Oval) harmonics(power float64) []float64 {
	// The trapezium rule converges geometrically: the singularities in phi lie
	// at an imaginary part of artanh((1-h)/(1+h)), above 0.6 for h <= 0.3.
	const points = 128
	g := zeros(points / 4)
	for i := range points {
		sin, cos := math.Sincos(math.Pi * float64(i) / points)
		v := math.Pow(square(cos/(1+o.Half))+square(sin/(1-o.Half)), power/2)
		for l := range g {
			c := math.Cos(2 * math.Pi * float64(l*i%points) / points)
			if l > 0 {
				c *= 2
			}
			g[l] += v * c / points
		}
	}
	return g
}

// symbolFactor is the integral over the circle of s(phi)^power times the
// angular functions of two nodes, with the sign i^(m-l) of their transforms.
func symbolFactor(g []float64, turn float64, a, b *node) float64 {
	m, l := a.order.m, b.order.m
	if (m-l)%2 != 0 {
		return 0
	}
	sum := 0.0
	// Only k = |m-l| and m+l meet.
	for i, k := range [2]int{max(m-l, l-m), m + l} {
		if k/2 >= len(g) || (i == 1 && min(m, l) == 0) {
			continue
		}
		sin, cos := math.Sincos(float64(k) * turn)
		if math.Abs(sin) < symmetryTolerance {
			sin = 0
		}
		if math.Abs(cos) < symmetryTolerance {
			cos = 0
		}
		sum += g[k/2] * (cos*angular(a.sine, m, b.sine, l, false, k) + sin*angular(a.sine, m, b.sine, l, true, k))
	}
	if (m-l)%4 != 0 {
		sum = -sum
	}
	return sum
}

// ovalFluid is the still fluid of an oval diaphragm.
type ovalFluid struct {
	turn          float64   // angle of the long axis from the axis of the system
	baffled, open float64   // density times a^3, summed over faces
	inverse, pure []float64 // harmonics of 1/s and s
}

func newOvalFluid(o Oval, axis float64, even *Solution) *ovalFluid {
	f := &ovalFluid{turn: o.Angle - axis, inverse: o.harmonics(-1), pure: o.harmonics(1)}
	plan := even.orders[0]
	for _, face := range plan.faces {
		switch v := face.(type) {
		case *baffledFace:
			f.baffled += v.density
		case *openFaces:
			f.open += v.density
		}
	}
	if o.Half == 0 || f.baffled == 0 && f.open == 0 {
		return nil
	}
	return f
}

// joined tells whether the shape of the ring couples two nodes through the fluid.
func (f *ovalFluid) joined(a, b *node) bool {
	return symbolFactor(f.inverse, f.turn, a, b) != 0 || symbolFactor(f.pure, f.turn, a, b) != 0
}

// addMass adds what the oval shape changes of the fluid's mass to the block.
func (f *ovalFluid) addMass(b *unevenBlock) {
	if f.baffled > 0 {
		for i, p := range b.nodes {
			for _, q := range b.nodes[:i+1] {
				v := symbolFactor(f.inverse, f.turn, p, q)
				if p == q {
					v -= circle(p.order.m)
				}
				if v != 0 {
					b.addShapes(p, q, scaled(crossForm(p.order, q.order), f.baffled*v))
				}
			}
		}
	}
	if f.open > 0 {
		f.addOpen(b)
	}
}

// crossForm is the mass of fluid of unit density on a baffled face between the
// radial shapes of two orders, as if the angles matched: the integral of
// J_b J_b' k^-4, which needs b and b' only.
func crossForm(p, q *coupledOrder) []float64 {
	x := zeros(p.n * q.n)
	m := min(p.m, q.m)
	for i := range p.n {
		for j := range q.n {
			x[i*q.n+j] = disc.HeldEdge.Form(m, i+(p.m-m)/2, j+(q.m-m)/2, -1)
		}
	}
	return x
}

// addShapes adds X, a matrix between the radial shapes of two orders, to the
// mass between the functions of two nodes.
func (b *unevenBlock) addShapes(p, q *node, x []float64) {
	half := zeros(q.order.n)
	for i := range p.order.omega {
		clear(half)
		for k, c := range p.order.row(i) {
			addTo(half, c, part(x, k, q.order.n))
		}
		for j := range q.order.omega {
			v := dot(half, q.order.row(j))
			b.mass[(p.at+i)*b.size+q.at+j] += v
			if p != q {
				b.mass[(q.at+j)*b.size+p.at+i] += v
			}
		}
	}
}

// addOpen does the same for open faces. The pressure across the sheet is
// expanded in disc.RootEdge shapes of all orders; their static operator joins
// only shapes with the same m + 2q, because
//
//	integral J_b J_b'/k dk = 1/(2b) if b = b', 0 if b - b' is another even number,
//
// so the mass is a sum over m + 2q of small inverses.
func (f *ovalFluid) addOpen(b *unevenBlock) {
	top := 0
	for _, n := range b.nodes {
		top = max(top, n.order.m+2*n.order.n)
	}
	for degree := 0; degree <= top; degree++ {
		var nodes []*node
		for _, n := range b.nodes {
			if q := degree - n.order.m; q >= 0 && q%2 == 0 && q/2 <= n.order.n {
				nodes = append(nodes, n)
			}
		}
		size := len(nodes)
		if size == 0 {
			continue
		}
		mu := float64(degree) + 1.5
		operator, round := zeros(size*size), zeros(size)
		for i, p := range nodes {
			for j, q := range nodes {
				operator[i*size+j] = symbolFactor(f.pure, f.turn, p, q) / (4 * mu)
			}
			round[i] = 4 * mu / circle(p.order.m)
		}
		inverse := inverseOf(operator, size)
		// Couplings of each function with the pressure shape of this degree.
		columns := make([][]float64, size)
		for i, p := range nodes {
			o := p.order
			q := (degree - o.m) / 2
			u := zeros(o.n)
			for j := max(0, q-1); j < o.n; j++ {
				u[j] = disc.HeldEdge.OpenCoupling(o.m, j, q)
			}
			columns[i] = zeros(len(o.omega))
			for k := range columns[i] {
				columns[i][k] = circle(o.m) * dot(u, o.row(k))
			}
		}
		for i, p := range nodes {
			for j, q := range nodes {
				v := inverse[i*size+j]
				if i == j {
					v -= round[i]
				}
				if v *= f.open; v == 0 {
					continue
				}
				for k, x := range columns[i] {
					addTo(part(b.mass, p.at+k, b.size)[q.at:], v*x, columns[j])
				}
			}
		}
	}
}

// inverseOf returns the inverse of a small positive definite matrix.
func inverseOf(a []float64, n int) []float64 {
	l := append([]float64(nil), a...)
	cholesky(l, n)
	inverse := zeros(n * n)
	x := zeros(n)
	for c := range n {
		clear(x)
		x[c] = 1
		forward(l, n, x)
		backward(l, n, x)
		for r, v := range x {
			inverse[r*n+c] = v
		}
	}
	return inverse
}
