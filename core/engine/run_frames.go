package engine

import (
	"context"
	"encoding/json"
	"math"

	"hoopsheet/core/response"
)

// motions keeps the last few that are streamed.
var motions = newCache[string, *response.Motion](2)

// motionKey is the text of a request, without what does not change the motion.
func motionKey(request *RespondRequest) string {
	own := *request
	own.Frames, own.Stream, own.Points, own.Neighbour = 2, true, nil, nil
	text, err := json.Marshal(&own)
	if err != nil {
		return "" // not finite: refused before anything is kept
	}
	return string(text)
}

// mostFrameValues of one call, 16 MB.
const mostFrameValues = 4 << 20

func runFrames(_ context.Context, request *FramesRequest) (*FramesResult, error) {
	key := motionKey(&request.Respond)
	motion, kept := motions.get(key)
	if !kept {
		own := request.Respond
		own.Frames, own.Stream = 2, true
		c, err := respondCaseOf(&own)
		if err != nil {
			return nil, err
		}
		var problems []Problem
		if motion, problems = response.Prepare(c); len(problems) > 0 {
			return nil, refuse(problems)
		}
		motions.put(key, motion)
	}
	radii, angles := motion.Grid()
	size := radii * angles
	switch {
	case !(request.From >= 0) || math.IsInf(request.From, 1):
		return nil, Fail("from", CodeRange, "The time of the first frame must be from 0 on.")
	case !(request.Step >= 0) || math.IsInf(request.Step, 1):
		return nil, Fail("step", CodeRange, "The time between two frames must be from 0 on.")
	case request.Count < 1 || request.Count > mostFrameValues/size:
		return nil, Fail("count", CodeRange, "The number of frames of one call must be from 1 to 4194304 values.")
	}
	result := &FramesResult{Motion: make(Numbers, request.Count*size), Angles: angles}
	motion.Frames(result.Motion, request.From, request.Step)
	return result, nil
}
