package engine

import (
	"context"

	"hoopsheet/core/quantity"
)

// shownDigits of a value that was typed with fewer.
const shownDigits = 6

// mostItems of one read call.
const mostItems = 100

func runRead(_ context.Context, request *ReadRequest) (*ReadResult, error) {
	if len(request.Items) > mostItems {
		return nil, Fail("items", CodeRange, "One call reads at most 100 texts.")
	}
	result := &ReadResult{}
	for _, item := range request.Items {
		result.Readings = append(result.Readings, readItem(item))
	}
	return result, nil
}

func readItem(item ReadItem) ReadOut {
	out := ReadOut{Field: item.Field, Unit: item.Unit}
	asked := quantity.Asked{Name: item.Name, Dimension: item.Dimension, Unit: item.Unit}
	reading, err := asked.Parse(item.Text)
	if err != nil {
		out.Problem = err.Error()
		return out
	}
	out.Unit = reading.Unit.Symbol
	if item.Low != item.High && !(reading.SI >= item.Low && reading.SI <= item.High) {
		low, high := quantity.FormatWithUnit(item.Low, out.Unit, 4), quantity.FormatWithUnit(item.High, out.Unit, 4)
		out.Problem = sentenceStart(item.Name) + " is " + quantity.FormatWithUnit(reading.SI, out.Unit, 4) + "; it must be from " + low + " to " + high + "."
		return out
	}
	out.Value = reading.SI
	out.Text = quantity.Format(reading.SI, out.Unit, shownDigits)
	out.Echo = reading.Echo
	return out
}

// sentenceStart writes a name as the first words of a sentence.
func sentenceStart(name string) string {
	if name == "" {
		return "The value"
	}
	return "The " + name
}
