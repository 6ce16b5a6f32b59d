package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"html/template"
	"image"
	"image/color"
	"image/png"
	"math"
	"strings"
)

// The mark: a hoop, its clamps as dots around it, one nodal chord as dashes across it. Lengths are in a square from
// -16 to 16.
const (
	markRadius   = 11.4
	markStroke   = 2.3
	markClamps   = 6
	clampCentre  = 12.6
	clampRadius  = 2.5
	chordTurn    = -0.42 // radians from the horizontal
	chordOffset  = 2.4
	chordStroke  = 2.2
	chordDash    = 3.4
	chordGap     = 2.2
	iconPaper    = "#fffefb"
	iconInk      = "#1c2730"
	iconChord    = "#0d6a68"
	iconMaskable = 0.74 // the mark's size inside a maskable icon, whose outer fifth may be cut off
)

// markDashes are the centres of the chord's dashes along it, counted from its middle.
func markDashes() []float64 {
	half := math.Sqrt(markRadius*markRadius-chordOffset*chordOffset) - markStroke/2 - 0.4
	step := chordDash + chordGap
	count := int(math.Floor((half-chordDash/2)/step))*2 + 1
	var centres []float64
	for i := range count {
		centres = append(centres, float64(i-count/2)*step)
	}
	return centres
}

// markSVG is the inside of an <svg viewBox="-16 -16 32 32">. The arguments are the attributes that colour each part.
func markSVG(hoop, clamp, chord string) string {
	var out strings.Builder
	fmt.Fprintf(&out, `<circle r="%g" fill="none" stroke-width="%g" %s/>`, markRadius, markStroke, hoop)
	for i := range markClamps {
		angle := 2 * math.Pi * float64(i) / markClamps
		fmt.Fprintf(&out, `<circle cx="%.2f" cy="%.2f" r="%g" %s/>`, clampCentre*math.Cos(angle), clampCentre*math.Sin(angle), clampRadius, clamp)
	}
	ux, uy := math.Cos(chordTurn), math.Sin(chordTurn)
	for _, s := range markDashes() {
		x, y := -uy*chordOffset+ux*s, ux*chordOffset+uy*s
		fmt.Fprintf(&out, `<path d="M%.2f %.2fL%.2f %.2f" stroke-width="%g" %s/>`,
			x-ux*chordDash/2, y-uy*chordDash/2, x+ux*chordDash/2, y+uy*chordDash/2, chordStroke, chord)
	}
	return out.String()
}

// barMark is the mark in the bar on top, coloured by the theme.
func barMark() template.HTML {
	return template.HTML(`<svg viewBox="-16 -16 32 32" aria-hidden="true">` +
		markSVG(`class="hoop"`, `class="clamp"`, `class="chord"`) + `</svg>`)
}

// markPNG draws the same mark on paper, size by size pixels, each pixel the mean of 4 by 4 samples.
func markPNG(size int, scale float64) ([]byte, error) {
	const samples = 4
	paper, ink, chord := rgb(iconPaper), rgb(iconInk), rgb(iconChord)
	m := newMark()
	img := image.NewRGBA(image.Rect(0, 0, size, size))
	for py := range size {
		for px := range size {
			var sum [3]float64
			for i := range samples * samples {
				x := (float64(px)+(float64(i%samples)+0.5)/samples)*32/float64(size) - 16
				y := (float64(py)+(float64(i/samples)+0.5)/samples)*32/float64(size) - 16
				c := paper
				switch m.at(x/scale, y/scale) {
				case 1:
					c = ink
				case 2:
					c = chord
				}
				for k := range sum {
					sum[k] += float64(c[k])
				}
			}
			const n = samples * samples
			img.SetRGBA(px, py, color.RGBA{uint8(sum[0]/n + 0.5), uint8(sum[1]/n + 0.5), uint8(sum[2]/n + 0.5), 255})
		}
	}
	var out bytes.Buffer
	err := png.Encode(&out, img)
	return out.Bytes(), err
}

// mark is the geometry worked out once for drawing by points.
type mark struct {
	clamps [markClamps][2]float64
	dashes []float64
	ux, uy float64 // along the chord
}

func newMark() mark {
	m := mark{dashes: markDashes(), ux: math.Cos(chordTurn), uy: math.Sin(chordTurn)}
	for i := range m.clamps {
		angle := 2 * math.Pi * float64(i) / markClamps
		m.clamps[i] = [2]float64{clampCentre * math.Cos(angle), clampCentre * math.Sin(angle)}
	}
	return m
}

// at is 1 on hoop and clamps, 2 on the chord, 0 elsewhere.
func (m *mark) at(x, y float64) int {
	switch radius := math.Sqrt(x*x + y*y); {
	case math.Abs(radius-markRadius) <= markStroke/2:
		return 1
	case radius > clampCentre-clampRadius:
		for _, c := range m.clamps {
			if (x-c[0])*(x-c[0])+(y-c[1])*(y-c[1]) <= clampRadius*clampRadius {
				return 1
			}
		}
		return 0
	}
	along, across := x*m.ux+y*m.uy, -x*m.uy+y*m.ux-chordOffset
	if math.Abs(across) <= chordStroke/2 {
		for _, s := range m.dashes {
			if math.Abs(along-s) <= chordDash/2 {
				return 2
			}
		}
	}
	return 0
}

func rgb(hex string) [3]uint8 {
	var c [3]uint8
	if _, err := fmt.Sscanf(hex, "#%02x%02x%02x", &c[0], &c[1], &c[2]); err != nil {
		panic(err) // a constant above is malformed
	}
	return c
}

// addIcons makes the icon in its sizes and the manifest that names them.
func addIcons(files Output) error {
	files["icon.svg"] = fmt.Appendf(nil, `<svg xmlns="http://www.w3.org/2000/svg" viewBox="-16 -16 32 32">`+
		`<rect x="-16" y="-16" width="32" height="32" rx="6" fill="%s"/>%s</svg>`+"\n", iconPaper,
		markSVG(`stroke="`+iconInk+`"`, `fill="`+iconInk+`"`, `stroke="`+iconChord+`"`))
	for _, icon := range []struct {
		name  string
		size  int
		scale float64
	}{{"icon-180.png", 180, 0.86}, {"icon-192.png", 192, 0.94}, {"icon-512.png", 512, iconMaskable}} {
		drawn, err := markPNG(icon.size, icon.scale)
		if err != nil {
			return err
		}
		files[icon.name] = drawn
	}
	type entry struct {
		Src     string `json:"src"`
		Sizes   string `json:"sizes"`
		Type    string `json:"type"`
		Purpose string `json:"purpose"`
	}
	manifest, err := json.MarshalIndent(map[string]any{
		"name":             "Hoopsheet",
		"short_name":       "Hoopsheet",
		"description":      "Working pages for tensioned round diaphragms: specify, foresee, prove, hand over.",
		"lang":             "en-GB",
		"start_url":        "./index.html",
		"scope":            "./",
		"display":          "minimal-ui",
		"background_color": "#faf8f3",
		"theme_color":      iconPaper,
		"icons": []entry{
			{"icon.svg", "any", "image/svg+xml", "any"},
			{"icon-192.png", "192x192", "image/png", "any"},
			{"icon-512.png", "512x512", "image/png", "maskable"},
		},
	}, "", "  ")
	files["manifest.webmanifest"] = append(manifest, '\n')
	return err
}
