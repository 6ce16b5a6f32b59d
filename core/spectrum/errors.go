package spectrum

// Error says, in a sentence for the reader of the page, what is wrong with an input.
type Error struct {
	Field   string // the input it belongs to: "recording", or the name of an option
	Code    Code
	Message string // names the input, what is wrong and what is allowed
}

func (e *Error) Error() string { return e.Message }

// Note tells what was repaired, left out or doubted. It is no error: the figures stand.
type Note struct {
	Code    Code
	Message string
}

// Code names an error or a note for programs; the message is for people.
type Code string

// Errors of a recording.
const (
	CodeNotWAV       Code = "not-wav"
	CodeNoFormat     Code = "no-format"
	CodeNoData       Code = "no-data"
	CodeEncoding     Code = "encoding"
	CodeSampleSize   Code = "sample-size"
	CodeChannels     Code = "channels"
	CodeRate         Code = "rate"
	CodeBlockAlign   Code = "block-align"
	CodeNotFinite    Code = "not-finite"
	CodeTooShort     Code = "too-short"
	CodeOptionRange  Code = "option-range"
	CodeOptionChoice Code = "option-choice"
)

// Notes.
const (
	NoteCutShort    Code = "cut-short"     // the header promises more than the file holds
	NoteNoLength    Code = "no-length"     // the header gives no length; all that follows is used
	NoteByteRate    Code = "byte-rate"     // the header's byte rate contradicts its sample rate
	NotePartFrame   Code = "part-frame"    // bytes left over after the last whole sample
	NoteTooLong     Code = "too-long"      // only the first part of a very long file is read
	NoteGaps        Code = "gaps"          // some samples were no numbers and are read as zero
	NoteOverscale   Code = "over-scale"    // floating samples beyond 1
	NoteChannel     Code = "channel"       // channels cancel, one of them is used
	NoteNoStrike    Code = "no-strike"     // nothing in it looks like a strike
	NoteStrikeAtCut Code = "strike-at-cut" // the recording begins in the strike
	NoteNextStrike  Code = "next-strike"   // the stretch ends where the next strike begins
	NoteClipped     Code = "clipped"
	NoteQuiet       Code = "too-quiet"
	NoteGlide       Code = "glide"         // a line rings sharp at first
	NoteShort       Code = "short-stretch" // little sound after the strike
	NoteMorePeaks   Code = "more-peaks"    // weaker peaks left out
	NoteNoPeaks     Code = "no-peaks"
)
