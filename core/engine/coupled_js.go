package engine

// coupledHere: see coupled.go.
const coupledHere = false
