package engine

import (
	"context"
	"math"
	"strconv"
	"strings"
)

// CheckRequest compares published values with what the engine computes.
type CheckRequest struct {
	Checks []Check `json:"checks"`
}

// Check is one published value.
type Check struct {
	Group string `json:"group"`
	Name  string `json:"name"`
	// Quantity names what is computed, Arguments in SI units are its own.
	Quantity  string    `json:"quantity"`
	Arguments []float64 `json:"arguments"`
	// Expected as printed. Half a unit of its last digit is allowed, times
	// Slack where that is given, and one ulp.
	Expected string  `json:"expected"`
	Slack    float64 `json:"slack,omitempty"`
	Source   string  `json:"source"`
}

// CheckResult holds one outcome for each check, in order.
type CheckResult struct {
	Outcomes []CheckOutcome `json:"outcomes"`
	Agreeing int            `json:"agreeing"`
}

// CheckOutcome is the comparison of one value.
type CheckOutcome struct {
	// Computed to two digits more than printed.
	Computed   string  `json:"computed"`
	Difference float64 `json:"difference"`
	Allowed    float64 `json:"allowed"`
	Agrees     bool    `json:"agrees"`
	// Problem says why nothing was computed; empty otherwise.
	Problem string `json:"problem"`
}

// mostChecks of one call.
const mostChecks = 2000

func runCheck(ctx context.Context, request *CheckRequest) (*CheckResult, error) {
	if len(request.Checks) > mostChecks {
		return nil, Fail("checks", CodeRange, "One call makes at most 2000 checks.")
	}
	result := &CheckResult{}
	report := progress(ctx)
	for i, check := range request.Checks {
		outcome := compare(check)
		if outcome.Agrees {
			result.Agreeing++
		}
		result.Outcomes = append(result.Outcomes, outcome)
		report(float64(i+1) / float64(len(request.Checks)))
	}
	return result, nil
}

func compare(check Check) CheckOutcome {
	expected, err := strconv.ParseFloat(check.Expected, 64)
	if err != nil {
		return CheckOutcome{Problem: "The expected value is no number."}
	}
	value, problem := evaluate(check.Quantity, check.Arguments)
	if problem != "" {
		return CheckOutcome{Problem: problem}
	}
	unit, digits := lastUnit(check.Expected)
	allowed := unit / 2
	if check.Slack > 0 {
		allowed *= check.Slack
	}
	// Reading the printed value rounds by up to half an ulp, and no double lies
	// nearer to the true value than half an ulp.
	allowed += math.Nextafter(math.Abs(expected), math.Inf(1)) - math.Abs(expected)
	difference := value - expected
	return CheckOutcome{
		Computed:   strconv.FormatFloat(value, 'g', min(digits+2, 17), 64),
		Difference: difference,
		Allowed:    allowed,
		Agrees:     math.Abs(difference) <= allowed,
	}
}

// lastUnit gives one unit of the last printed digit and the number of digits.
func lastUnit(text string) (unit float64, digits int) {
	mantissa, exponent, _ := strings.Cut(strings.ToLower(text), "e")
	_, decimals, _ := strings.Cut(mantissa, ".")
	power, _ := strconv.Atoi(exponent)
	for _, r := range mantissa {
		if r >= '0' && r <= '9' && (digits > 0 || r != '0') {
			digits++
		}
	}
	return math.Pow(10, float64(power-len(decimals))), max(digits, 1)
}
