package engine

import (
	"context"
	"math"
	"testing"
)

// TestFramesOfResponse: frames on demand, before and after the motion is kept,
// are those of the whole response.
func TestFramesOfResponse(t *testing.T) {
	ctx := context.Background()
	whole, err := runRespond(ctx, respondRequest())
	if err != nil {
		t.Fatal(err)
	}
	var largest float64
	for _, v := range whole.Envelope {
		largest = math.Max(largest, float64(v))
	}
	for range 2 {
		frames, err := runFrames(ctx, &FramesRequest{Respond: *respondRequest(), From: 0.02, Step: 0.005, Count: 3})
		if err != nil {
			t.Fatal(err)
		}
		size := 9 * frames.Angles
		if len(frames.Motion) != 3*size || frames.Angles != whole.Angles {
			t.Fatalf("%d values, %d angles", len(frames.Motion), frames.Angles)
		}
		for i, v := range frames.Motion {
			// Rounding to float32.
			if d := math.Abs(float64(v - whole.Motion[4*size+i])); d > 0x1p-23*largest {
				t.Fatalf("value %d off by %g", i, d)
			}
		}
		streamed := respondRequest()
		streamed.Stream = true
		if r, err := runRespond(ctx, streamed); err != nil || len(r.Motion) != 0 || r.Travel != whole.Travel {
			t.Fatal(err)
		}
	}
}

func TestFramesRefuse(t *testing.T) {
	good := func() *FramesRequest { return &FramesRequest{Respond: *respondRequest(), Step: 0.01, Count: 2} }
	for field, change := range map[string]func(*FramesRequest){
		"from":   func(r *FramesRequest) { r.From = -1 },
		"step":   func(r *FramesRequest) { r.Step = math.Inf(1) },
		"count":  func(r *FramesRequest) { r.Count = 1 << 20 },
		"orders": func(r *FramesRequest) { r.Respond.Orders = -1 },
	} {
		r := good()
		change(r)
		if _, err := runFrames(context.Background(), r); !refusedAt(err, field) {
			t.Errorf("%s: %v", field, err)
		}
	}
	if _, err := runFrames(context.Background(), good()); err != nil {
		t.Error(err)
	}
}
