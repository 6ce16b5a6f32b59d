package engine

import (
	"context"

	"hoopsheet/core/diaphragm"
	"hoopsheet/core/quantity"
)

// mostCompared modes are compared, among moreOfOther more of the other one.
const (
	mostCompared = 200
	moreOfOther  = 60
)

func runCompare(ctx context.Context, request *CompareRequest) (*CompareResult, error) {
	if err := refuse(outside("count", "The number of modes", request.Count, 1, mostCompared)); err != nil {
		return nil, err
	}
	now, err := runModes(ctx, &ModesRequest{Document: request.Document, Count: request.Count})
	if err != nil {
		return nil, err
	}
	other, err := runModes(ctx, &ModesRequest{Document: request.Other, Count: request.Count + moreOfOther})
	if err != nil {
		return nil, err
	}
	result := &CompareResult{Modes: []ComparedMode{}, Lines: comparedLines(request.Document, request.Other)}
	for i := range now.Modes {
		mode := &now.Modes[i]
		row := ComparedMode{M: mode.M, N: mode.N, Upper: mode.Upper, Frequency: mode.Frequency, RingDown: mode.RingDown, Verdict: verdictOf(mode)}
		// Where only one of the two splits its pairs, both of a pair are held against the one.
		if partner := sameMode(other.Modes, mode); partner != nil {
			row.Other, row.OtherRingDown, row.OtherVerdict = partner.Frequency, partner.RingDown, verdictOf(partner)
			row.Relative = mode.Frequency/partner.Frequency - 1
			row.Differs = clearanceOf(mode) != clearanceOf(partner)
		}
		if row.Differs {
			result.Changed++
		}
		result.Modes = append(result.Modes, row)
	}
	return result, nil
}

// sameMode finds the mode of the same name; without it the even one.
func sameMode(list []Mode, wanted *Mode) *Mode {
	var even *Mode
	for i := range list {
		mode := &list[i]
		if mode.M == wanted.M && mode.N == wanted.N {
			if mode.Upper == wanted.Upper {
				return mode
			}
			even = mode
		}
	}
	return even
}

// verdictOf says how a mode stands to the lines to keep clear of.
func verdictOf(mode *Mode) string {
	words := clearanceOf(mode)
	if !mode.BelowLowest && words != "" {
		words += ": " + mode.Distances[0].Line
	}
	return words
}

// clearanceOf is the same without the name of the line.
func clearanceOf(mode *Mode) string {
	switch {
	case mode.BelowLowest:
		return "below the lowest allowed"
	case len(mode.Distances) == 0:
		return ""
	}
	return string(mode.Distances[0].Clearance)
}

// comparedLines lists the lines of two specifications that differ.
func comparedLines(now, other diaphragm.Diaphragm) []ComparedLine {
	lines := []ComparedLine{}
	theirs := diaphragm.SpecificationLines(other, nil, quantity.SI)
	used := make([]bool, len(theirs))
	for _, line := range diaphragm.SpecificationLines(now, nil, quantity.SI) {
		row := ComparedLine{Group: line.Group, Name: line.Name, Now: line.Text, Unit: line.Unit}
		same := false
		for i, their := range theirs {
			if !used[i] && their.Group == line.Group && their.Name == line.Name {
				used[i], row.Other, same = true, their.Text, their.Text == line.Text && their.Unit == line.Unit
				break
			}
		}
		if !same {
			lines = append(lines, row)
		}
	}
	for i, their := range theirs {
		if !used[i] {
			lines = append(lines, ComparedLine{Group: their.Group, Name: their.Name, Other: their.Text, Unit: their.Unit})
		}
	}
	return lines
}
