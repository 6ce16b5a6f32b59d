package engine

// FramesRequest asks for frames of a motion, for a replay that draws them as
// they come.
type FramesRequest struct {
	// Respond is the request of the motion; its Frames are not read.
	Respond RespondRequest `json:"respond"`
	// From is the time of the first, s, Step that between two, and Count how many
	// there are.
	From  float64 `json:"from"`
	Step  float64 `json:"step"`
	Count int     `json:"count"`
}

// FramesResult holds the frames.
type FramesResult struct {
	// Motion is as in RespondResult: Count frames of Radii x Angles values, m.
	Motion Numbers `json:"motion"`
	// Angles of the display grid, as used.
	Angles int `json:"angles"`
}
