// Package spectrum turns recordings of taps into peaks: frequencies, levels and
// decay rates, each with a standard uncertainty.
//
// The way through the package, one file a step:
//
//	wav.go, pcm.go   bytes of a WAV file to samples; lying headers repaired or refused
//	recording.go     the samples, their rate, the choice of channel
//	onset.go         where each strike starts
//	quality.go       clipping, level, how far a strike stands out of its background
//	decimate.go      fewer samples where the highest frequency allows it
//	window.go        Hann, four-term Blackman-Harris, rectangular, and their figures
//	analyzer.go      the work space: FFT plans and buffers, windowed power spectra
//	floor.go         noise floor by running median
//	find.go          local maxima that stand out of the floor and of side lobes
//	interpolate.go   the log parabola through three bins
//	ringdown.go      decay rate from the narrow-band envelope
//	uncertainty.go   what noise, interpolation and neighbours do to a frequency
//	ladder.go        spectra over a ladder of lengths, and the candidates they show
//	candidates.go    their decay rates, and the rung on which each is read best
//	joint.go         close lines read together as damped exponentials, pairs that no spectrum resolves split
//	glide.go         a line that rings sharp at first and glides down
//	peaks.go         candidates to peaks: ringing, steady or unclear, mains or not
//	display.go       a spectrum with few points in which no peak vanishes
//	analyse.go       the whole, with options and result
//
// # Ladder of lengths
//
// One window length cannot suit a mode that rings for two seconds and one that is
// gone in fifty milliseconds. The stretch after the strike is therefore transformed
// at its full length L and at L/2, L/4, ... (which together cost less than twice the
// first), peaks are looked for on every rung, and each is read on the rung where its
// stated uncertainty is smallest. For a decay rate d that is a length of about 3/d.
//
// # Convention
//
// A tone is A exp(-d t) cos(2 pi f t + phase): A in parts of full scale at the start
// of the stretch used, d in 1/s, f in Hz. Powers are of single bins; levels are in dB.
// No number in a result is NaN or infinite.
package spectrum
