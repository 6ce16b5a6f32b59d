package diaphragm

// Parcel is what a hand-over link or file carries: the specification, the
// figures as sent and the chosen peaks; never recordings.
type Parcel struct {
	Document Diaphragm    `json:"document"`
	Figures  []Figure     `json:"figures"`
	Peaks    []ChosenPeak `json:"peaks"`
	// Tapped is when the peaks were taken and Sent when the parcel was made,
	// RFC 3339; Engine is the version that computed the figures.
	Tapped string `json:"tapped"`
	Sent   string `json:"sent"`
	Engine string `json:"engine"`
}

// Figure is one computed figure in SI units, named by its id ("f.0.1" for the
// frequency of mode (0,1)).
type Figure struct {
	ID    string  `json:"id"`
	Value float64 `json:"value"`
}

// ChosenPeak is a measured peak that the person read as mode (M, N); both are
// 0 where the reading was left to the page.
type ChosenPeak struct {
	// Frequency and its standard uncertainty, Hz.
	Frequency   float64 `json:"frequency"`
	Uncertainty float64 `json:"uncertainty"`
	M           int     `json:"m"`
	N           int     `json:"n"`
}

// TapSession is one set of taps on one diaphragm, as it is kept.
type TapSession struct {
	ID string `json:"id"`
	// Diaphragm is the id of the diaphragm; Revision the kept revision that
	// stood when the tap was taken.
	Diaphragm string `json:"diaphragm"`
	Revision  int    `json:"revision"`
	// Taken is the time of the tap, RFC 3339.
	Taken      string `json:"taken"`
	By         string `json:"by"`
	Instrument string `json:"instrument"`
	Notes      string `json:"notes"`
	// AirTemperature and SheetTemperature at the tap, K; 0 where not stated.
	AirTemperature   float64      `json:"airTemperature"`
	SheetTemperature float64      `json:"sheetTemperature"`
	Peaks            []ChosenPeak `json:"peaks"`
	// Tension fitted, N/m, its standard uncertainty, and the verdict as shown
	// then, with the version of the engine that gave them.
	Tension             float64 `json:"tension"`
	StandardUncertainty float64 `json:"standardUncertainty"`
	Verdict             string  `json:"verdict"`
	Engine              string  `json:"engine"`
	// RecordingName is the file name of the recording kept with the session;
	// empty where none is kept. Microphone tells what the browser applied.
	RecordingName string `json:"recordingName"`
	Microphone    string `json:"microphone"`
}
