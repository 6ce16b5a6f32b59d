package tap

// airFactor is the added mass of one side over rho a times the integral of
// w^2, for the mode shape J_m(j r/a) cos m theta, incompressible.
type airFactor struct {
	// baffled: the rim in an infinite rigid baffle,
	//   Gamma = 2 j^2 integral over k from 0 of J_m(k)^2 / (j^2 - k^2)^2.
	// open: no baffle, the same fluid on both sides (this is one side's half),
	//   Gamma = [J_v'(j)^2 + (1 - v^2/j^2) J_v(j)^2] / (j J_m'(j)^2), v = m + 1/2.
	baffled, open float64
}

// addedMass holds the factors by mode. The definition is that of Kwak, J. Sound
// Vib. 178 (1994) 688-690 (his table was not at hand); baffled values computed
// twice, from the closed form of the integral and by quadrature; open values
// from Copson's solution of the dual integral equations, which gives Lamb's
// 4/3 for the rigid disc.
var addedMass = map[ModeName]airFactor{
	{0, 1}: {0.7464351569, 0.4929631608},
	{0, 2}: {0.2616424396, 0.1967780594},
	{0, 3}: {0.1521789263, 0.1220314005},
	{1, 1}: {0.3301319583, 0.2867947214},
	{1, 2}: {0.1702543684, 0.1511749832},
	{1, 3}: {0.1136553187, 0.1025999598},
	{2, 1}: {0.2258285739, 0.2079959906},
	{2, 2}: {0.1341083804, 0.1243901343},
	{2, 3}: {0.09546369955, 0.08916767804},
	{3, 1}: {0.17470487, 0.16493077},
	{3, 2}: {0.1123847505, 0.1063997448},
	{3, 3}: {0.08335632949, 0.0792005366},
	{4, 1}: {0.1435770744, 0.1373829692},
	{4, 2}: {0.09742494611, 0.09333918066},
	{4, 3}: {0.07442575351, 0.07144988394},
	{5, 1}: {0.122382149, 0.1180952096},
	{5, 2}: {0.08633771276, 0.08335885642},
	{5, 3}: {0.06746486269, 0.06521756232},
}
