// Package disc analyses and synthesises functions on the unit disc.
//
// # Fourier-Bessel series
//
// The basis is the set of vibration shapes of an ideal sheet held at r = 1,
//
//	phi_mn(r, theta) = J_m(j_mn r) cos(m theta)   and   J_m(j_mn r) sin(m theta),
//
// m = 0..M nodal diameters, n = 1..N nodal circles counting the rim, j_mn the
// n-th positive zero of J_m. A function is
//
//	f = sum over m, n of J_m(j_mn r) [a_mn cos(m theta) + b_mn sin(m theta)],
//
// so coefficients carry the unit of f and are not normalised. The squared norm
// of one basis function over the disc (area element r dr dtheta) is
//
//	(pi eps_m / 2) J_{m+1}(j_mn)^2,   eps_0 = 2, eps_m = 1 for m >= 1,
//
// given by Basis.Norm. Abramowitz & Stegun 11.4.5 has the radial part.
//
// A Basis holds the band M, N with its zeros; a Grid the radii, weights and
// angles; a Transform takes samples to coefficients and back; a Table draws
// coefficients on any polar grid, frame after frame; Points does so at
// scattered points. These types own their work space: they do not allocate
// once built and may not be used by two goroutines at once.
//
// # What analysis gives
//
// On a Grid with at least MinRadii(M, N) radii and MinAngles(M) angles the
// integrals of any two basis functions of the band are exact to rounding, so a
// function inside the band comes back to about 1e-14 of its size, and Parseval
// holds equally. A function outside it is projected, as far as the grid sees
// it: what lies between the band and the grid's own limit is removed, what lies
// beyond the grid's limit is aliased, as with any sampled transform. Every
// analysis returns a Quality: the share of energy missed and how the
// coefficients fall off.
//
// # What a finite series does at a jump
//
// Every basis function is zero on the rim. A function that is not zero there,
// or that jumps inside the disc, has coefficients that fall off slowly: the
// missed energy goes down only like 1/N. Beside a jump the sum overshoots by
// 8.95 % of the height of the jump however many terms are taken (Gibbs), in a
// band whose width shrinks like 1/N; on the jump it takes the mean of both
// sides. At the rim the series goes on beyond r = 1 with the sign reversed, so
// the jump is twice the rim value and the overshoot 17.9 % of it. A jump along
// a whole circle is also heard at the centre, where its waves meet: the error
// there dies out only like N^(-1/2). Quality.Smooth is then false and no
// pointwise error is claimed. TestGibbsAtRim and TestGibbsInside hold these
// statements.
//
// # Polynomial families
//
// The shapes r^m (1-r^2)^nu P_j^(m,nu)(1-2r^2) have Hankel transforms
// J_{m+2j+nu+1}(k)/k^(nu+1) up to a constant; scaled so that the constant is 1,
// tension, mass and fluid matrices become rational numbers. See Edge.
package disc
