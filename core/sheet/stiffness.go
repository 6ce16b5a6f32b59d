package sheet

// BendingStiffness is the stiffness of a sheet against bending,
//
//	D = E h^3 / (12 (1 - nu^2))
//
// in N m, from its modulus E, Pa, thickness h, m, and Poisson's ratio nu,
// -1 < nu < 1. It holds for a sheet of one material that is alike in all
// directions; a coated fabric bends far more easily than its modulus in the
// plane says, because its threads slide.
//
// Source: Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, eq. 3.
func BendingStiffness(e, h, nu float64) float64 { return e * h * h * h / (12 * (1 - nu*nu)) }
