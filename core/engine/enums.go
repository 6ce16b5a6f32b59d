package engine

import (
	"reflect"

	"hoopsheet/core/air"
	"hoopsheet/core/diaphragm"
	"hoopsheet/core/modes"
	"hoopsheet/core/quantity"
	"hoopsheet/core/response"
	"hoopsheet/core/spectrum"
	"hoopsheet/core/tap"
)

// Enums lists the values of every string type of the contract that has a
// closed list of values, for the generated schema.
func Enums() map[reflect.Type][]string {
	return map[reflect.Type][]string{
		reflect.TypeFor[modes.Clearance]():     words(modes.Clearances()),
		reflect.TypeFor[spectrum.Kind]():       words(spectrum.Kinds()),
		reflect.TypeFor[Effect]():              words(AllEffects()),
		reflect.TypeFor[CreateFrom]():          words(CreateFroms()),
		reflect.TypeFor[quantity.System]():     words(quantity.Systems()),
		reflect.TypeFor[quantity.Dimension]():  words(quantity.Dimensions()),
		reflect.TypeFor[diaphragm.Action]():    words(diaphragm.Actions()),
		reflect.TypeFor[diaphragm.FaceKind]():  words(diaphragm.FaceKinds()),
		reflect.TypeFor[diaphragm.FieldKind](): words(diaphragm.FieldKinds()),
		reflect.TypeFor[diaphragm.GroupName](): words(diaphragm.GroupNames()),
		reflect.TypeFor[diaphragm.Rim]():       words(diaphragm.Rims()),
		reflect.TypeFor[air.FluidName]():       words(air.FluidNames()),
		reflect.TypeFor[response.ShapeKind]():  words(response.ShapeKinds()),
		reflect.TypeFor[response.SourceKind](): words(response.SourceKinds()),
		reflect.TypeFor[response.PulseKind]():  words(response.PulseKinds()),
		reflect.TypeFor[tap.Verdict]():         words(tap.Verdicts()),
	}
}

func words[T ~string](values []T) []string {
	texts := make([]string, len(values))
	for i, v := range values {
		texts[i] = string(v)
	}
	return texts
}
