package main

// chapters is the chapter list: groups in order, and the pages of each by file name.
var chapters = []struct {
	title string
	pages []string
}{
	{"", []string{"index"}},
	{"At the desk", []string{"specify", "modes", "respond"}},
	{"On site", []string{"tap"}},
	{"Afterwards", []string{"records", "hand-over"}},
	{"Behind it", []string{"method", "numbers", "cautions", "hosting", "scripts"}},
}
