package main

// work is one comparison.
type work struct {
	name      string
	pkg       string // under core/
	benchmark string
	script    string // under testdata/bench/
	line      string // name in the script's output
	against   string
	// Goals: how many times faster than Python; 0 where none is set. Below 1
	// means that slower is accepted.
	native, wasm float64
}

var works = []work{
	{"400 lowest modes of the ideal sheet", "modes", "BenchmarkModesTable", "modes_scipy.py", "modes-table", "SciPy jn_zeros and a sort", 0, 0},
	{"one frame of a response, 17 x 16 modes", "response", "BenchmarkRespondFrame", "response_numpy.py", "response-frame", "NumPy, same sums", 0, 0},
	{"one frame of 1,600 modes, 128 x 256", "response", "BenchmarkFrame1600", "response_numpy.py", "response-frame-1600", "NumPy with BLAS and FFT", 0, 0},
	{"WAV to peaks, 3 s at 48 kHz", "spectrum", "BenchmarkWavToPeaks", "spectrum_numpy.py", "wav-to-peaks", "NumPy and SciPy, same steps", 0, 0},
	{"10,000 zeros, m 0..39, n 1..250", "bessel", "BenchmarkZeros10000", "bessel_scipy.py", "BenchmarkZeros10000", "SciPy jn_zeros", 20, 8},
	{"J_nu(x), 1e6 random", "bessel", "BenchmarkJRandom", "bessel_scipy.py", "BenchmarkJRandom", "SciPy jv", 3, 1.5},
	{"J_0..J_200 at 1e4 points", "bessel", "BenchmarkJSeq200", "bessel_scipy.py", "BenchmarkJSeq200", "SciPy jv", 60, 20},
	{"disc 256 x 512, M = N = 64, there and back", "disc", "BenchmarkDisc256x512", "disc_numpy.py", "disc-256x512", "NumPy with BLAS and FFT", 1, 1. / 3},
}

// growing is a benchmark with a sub-benchmark for each size.
type growing struct{ name, pkg, benchmark string }

var growths = []growing{
	{"J by method and order, one value", "bessel", "BenchmarkJ"},
	{"J_0..J_n at one point", "bessel", "BenchmarkJSeqGrowth"},
	{"first n zeros of one order", "bessel", "BenchmarkZerosGrowth"},
	{"the other functions, one value", "bessel", "BenchmarkOthers"},
	{"disc there and back, M = N, 4N radii, 8N angles", "disc", "BenchmarkDiscGrowth"},
	{"a frame of a response: modes a way, radii with twice the angles, frames", "response", "BenchmarkFrameGrowth"},
	{"modes of the diaphragm as it stands", "modes", "BenchmarkWetModes"},
}
