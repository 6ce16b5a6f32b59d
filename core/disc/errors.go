package disc

// Messages of the panics of this package: each is a mistake of the caller's
// program, never of a person's input.
const (
	errAngles    = "disc: the number of angles must be even, and half of it a product of 2, 3 and 5 (see NextAngles)"
	errBand      = "disc: M must be at least 0 and N at least 1"
	errFewAngles = "disc: fewer angles than the band needs (see MinAngles)"
	errFewRadii  = "disc: fewer radii than the band needs (see MinRadii)"
	errLength    = "disc: slice of wrong length"
	errRadius    = "disc: radius outside 0 <= r <= 1"
	errRule      = "disc: a radial rule needs at least one radius and 0 <= alpha <= 2"
	errEdge      = "disc: no such family of shapes here"
	errForm      = "disc: the form does not exist: p must be at most 2 nu"
	errIndex     = "disc: order, zero or part outside the band"
)
