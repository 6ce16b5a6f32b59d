//go:build !js

package engine

// coupledHere: uneven tension and attached masses are computed. In the browser
// they are not, because their solver would take 50 kB of the 1.1 MB that a
// visitor fetches; the pages say so.
const coupledHere = true
