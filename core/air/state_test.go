package air

import (
	"errors"
	"math"
	"strings"
	"testing"
)

func TestMoist(t *testing.T) {
	state, err := Moist(293.15, 101325, 0.5)
	if err != nil {
		t.Fatal(err)
	}
	// Published values as in the tests of the formulas.
	if math.Abs(state.Density-1.199313895) > 1e-9 || math.Abs(state.SoundSpeed-343.98673) > 1e-5 || len(state.Notes) != 0 {
		t.Errorf("got %+v", state)
	}
}

func TestMoistNotes(t *testing.T) {
	for _, row := range []struct {
		celsius, pressure float64
		notes             int
	}{
		{15, 101325, 0}, {27, 101325, 0}, {14, 101325, 1}, {28, 101325, 1},
		{31, 101325, 2}, {-1, 101325, 2}, {20, 105e3, 1}, {20, 70e3, 1}, {20, 50e3, 2},
	} {
		state, err := Moist(row.celsius+273.15, row.pressure, 0.3)
		if err != nil || len(state.Notes) != row.notes {
			t.Errorf("%g °C, %g Pa: %d notes (%v), want %d", row.celsius, row.pressure, len(state.Notes), err, row.notes)
		}
	}
}

func TestMoistRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, row := range []struct {
		temperature, pressure, humidity float64
		quantity, words                 string
	}{
		{20, 101325, 0.5, "temperature", "-253.15 °C"},
		{nan, 101325, 0.5, "temperature", "-50 °C to 100 °C"},
		{inf, 101325, 0.5, "temperature", "-50 °C to 100 °C"},
		{293.15, 0, 0.5, "pressure", "10 kPa to 200 kPa"},
		{293.15, nan, 0.5, "pressure", "10 kPa to 200 kPa"},
		{293.15, 101325, 50, "humidity", "5000 %"},
		{293.15, 101325, -0.1, "humidity", "0 % to 100 %"},
		{293.15, 101325, nan, "humidity", "0 % to 100 %"},
		{373.15, 101325, 0.9, "humidity", "steam"},
	} {
		_, err := Moist(row.temperature, row.pressure, row.humidity)
		var domain *DomainError
		if !errors.As(err, &domain) || domain.Quantity != row.quantity || !strings.Contains(domain.Message, row.words) {
			t.Errorf("%g K, %g Pa, %g: %v, want %q in a sentence on the %s", row.temperature, row.pressure, row.humidity, err, row.words, row.quantity)
		}
	}
}
