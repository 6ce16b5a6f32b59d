package diaphragm

// Attached is what the sheet carries beside its own mass.
type Attached struct {
	// Patches, at most MostPatches.
	Patches []Patch `json:"patches,omitempty"`
	// Strips, at most MostStrips.
	Strips []Strip `json:"strips,omitempty"`
}

// IsZero is true where nothing is attached; the document then leaves the
// member out.
func (a Attached) IsZero() bool { return len(a.Patches) == 0 && len(a.Strips) == 0 }

// Patch is a round thing on the sheet: a sensor, a target, a repair.
type Patch struct {
	Name string `json:"name"`
	// Radius is the distance of its middle from the centre in units of the ring
	// radius, and Angle its direction, rad.
	Radius float64 `json:"radius"`
	Angle  float64 `json:"angle"`
	// Size is the patch's own radius, m.
	Size float64 `json:"size"`
	// Mass that it adds, kg.
	Mass float64 `json:"mass"`
	// Rigid is true for a stiff patch, false for one that bends with the sheet.
	Rigid bool `json:"rigid"`
}

// Strip is a straight strip across the sheet along a chord: a seam, a double
// overlap, a tape.
type Strip struct {
	Name string `json:"name"`
	// Offset is the distance of its middle line from the centre in units of the
	// ring radius, and Angle the direction in which it lies off the centre, rad:
	// at right angles to the strip, also where Offset is 0.
	Offset float64 `json:"offset"`
	Angle  float64 `json:"angle"`
	// Width, m.
	Width float64 `json:"width"`
	// Mass that the whole strip adds within the ring, kg.
	Mass float64 `json:"mass"`
}
