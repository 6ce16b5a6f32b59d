package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"text/tabwriter"

	"github.com/evanw/esbuild/pkg/api"
)

// browserLine is one thing measured in Chromium; Text is written as it stands.
type browserLine struct {
	Name    string  `json:"name"`
	Seconds float64 `json:"seconds"`
	Text    string  `json:"text"`
	Goal    string  `json:"goal"`
}

// printChromium measures the replay of 1,600 modes in Chromium, on the built
// site, by the calls and the drawing that its pages use.
func (b *bench) printChromium(w io.Writer) error {
	if _, err := os.Stat(filepath.Join(b.root, "site", "dist", "hoopsheet.js")); err != nil {
		fmt.Fprintln(w, "\nChromium: left out, since there is no built site (make build)")
		return nil
	}
	drawing, err := drawingModule(filepath.Join(b.root, "site", "src", "draw"))
	if err != nil {
		return err
	}
	file := filepath.Join(b.dir, "drawing.js")
	if err := os.WriteFile(file, drawing, 0o644); err != nil {
		return err
	}
	out, err := execute(exec.Command("node", filepath.Join(b.root, "site", "bench", "chromium.mjs"), file))
	if err != nil {
		return err
	}
	fmt.Fprintln(w, "\nresponses in Chromium, m to 39 and n to 40 on 128 x 256 points")
	table := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintln(table, "what\tmeasured\tgoal\t")
	for decoder := json.NewDecoder(bytes.NewReader(out)); decoder.More(); {
		var line browserLine
		if err := decoder.Decode(&line); err != nil {
			return err
		}
		if line.Text == "" {
			line.Text = duration(line.Seconds)
		}
		fmt.Fprintf(table, "%s\t%s\t%s\t\n", line.Name, line.Text, line.Goal)
	}
	return table.Flush()
}

// drawingModule bundles what the page Respond draws a frame with.
func drawingModule(dir string) ([]byte, error) {
	result := api.Build(api.BuildOptions{
		Stdin:  &api.StdinOptions{Contents: "export * from './polar'; export * from './signed-map';", ResolveDir: dir, Loader: api.LoaderTS},
		Bundle: true, Format: api.FormatESModule, Target: api.ES2022, LogLevel: api.LogLevelSilent,
	})
	if len(result.Errors) > 0 {
		return nil, errors.New(result.Errors[0].Text)
	}
	return result.OutputFiles[0].Contents, nil
}
