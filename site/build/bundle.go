package main

import (
	"encoding/json"
	"fmt"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"regexp"
	"slices"
	"strings"

	"github.com/evanw/esbuild/pkg/api"
)

// bundler runs esbuild over site/src and site/styles, and remembers which npm packages end up in the site.
type bundler struct {
	site     siteDirs
	goRoot   string
	buildID  string
	wasmPath string
	pages    []*Page

	workers map[string][]byte // bundled source of NAME.worker.ts and NAME.worklet.ts, by NAME
	used    map[string]bool   // npm packages
}

// hostedScripts are the files that a hosted page names.
type hostedScripts struct{ early, site string }

// workerSource matches the sources that become a script file of their own.
var workerSource = regexp.MustCompile(`^(.*)\.(worker|worklet)\.ts$`)

// scripts bundles everything in TypeScript that is not the service worker: workers first, since the pages' bundle
// names their files, then the pages' bundle and the stable hoopsheet.js.
func (b *bundler) scripts(files Output) (hostedScripts, error) {
	var none hostedScripts
	b.workers = map[string][]byte{}
	scriptFiles := map[string]string{}
	err := filepath.WalkDir(b.site.src, func(file string, d fs.DirEntry, err error) error {
		if err != nil || !d.Type().IsRegular() {
			return err
		}
		match := workerSource.FindStringSubmatch(d.Name())
		if match == nil {
			return nil
		}
		if b.workers[match[1]] != nil {
			return fmt.Errorf("two workers are named %s", match[1])
		}
		code, err := b.classic(file, nil)
		if err != nil {
			return err
		}
		b.workers[match[1]] = code
		scriptFiles[match[1]] = hashedName(match[1]+".js", code)
		files[path.Join(assetDir, scriptFiles[match[1]])] = code
		return nil
	})
	if err != nil {
		return none, err
	}

	early, err := b.classic(filepath.Join(b.site.src, "shell", "early.ts"), nil)
	if err != nil {
		return none, err
	}
	earlyPath := path.Join(assetDir, hashedName("early.js", early))
	files[earlyPath] = early

	options := b.options(map[string]string{buildModule: b.buildInfo(false, scriptFiles)})
	options.EntryPoints = []string{filepath.Join(b.site.src, "hoopsheet.ts"), filepath.Join(b.site.src, "shell", "site.ts")}
	options.Format = api.FormatESModule
	options.Splitting = true
	options.EntryNames, options.ChunkNames = "[name]-[hash]", "chunk-[hash]"
	options.Outdir = filepath.Join(b.site.root, assetDir)
	outputs, err := b.build(options)
	if err != nil {
		return none, err
	}
	entries := map[string]string{}
	for name, code := range outputs {
		files[path.Join(assetDir, name)] = code
		if entry, _, ok := strings.Cut(name, "-"); ok {
			entries[entry] = path.Join(assetDir, name)
		}
	}
	files["hoopsheet.js"] = fmt.Appendf(nil, "import './%[1]s';\nexport * from './%[1]s';\n", entries["hoopsheet"])
	return hostedScripts{early: earlyPath, site: entries["site"]}, nil
}

// classic bundles one entry as a classic script that needs nothing beside itself.
func (b *bundler) classic(entry string, modules map[string]string) ([]byte, error) {
	all := map[string]string{buildModule: b.buildInfo(false, nil)}
	for name, source := range modules {
		all[name] = source
	}
	options := b.options(all)
	options.EntryPoints = []string{entry}
	options.Format = api.FormatIIFE
	options.Outfile = filepath.Join(b.site.root, "out.js")
	options.Define = map[string]string{"import.meta.url": `""`}
	outputs, err := b.build(options)
	if err != nil {
		return nil, err
	}
	return outputs["out.js"], nil
}

const buildModule = "hoopsheet:build"

// buildInfo is the source of the module hoopsheet:build, see site/src/modules.d.ts.
func (b *bundler) buildInfo(single bool, scriptFiles map[string]string) string {
	type pageName struct {
		Name  string `json:"name"`
		Title string `json:"title"`
	}
	names := []pageName{}
	for _, page := range b.pages {
		names = append(names, pageName{page.Name, page.Title})
	}
	if scriptFiles == nil {
		scriptFiles = map[string]string{}
	}
	return module(map[string]any{
		"buildId":     b.buildID,
		"single":      single,
		"wasmFile":    path.Base(b.wasmPath),
		"scriptFiles": scriptFiles,
		"rootPath":    "../",
		"pages":       names,
	})
}

// module writes constants as the source of a JavaScript module.
func module(constants map[string]any) string {
	var out strings.Builder
	for name, value := range constants {
		text, err := json.Marshal(value)
		if err != nil {
			panic(err) // strings, lists and maps of strings only
		}
		fmt.Fprintf(&out, "export const %s = %s;\n", name, text)
	}
	lines := strings.SplitAfter(out.String(), "\n")
	slices.Sort(lines)
	return strings.Join(lines, "")
}

// styles bundles the pages' sheet with its fonts as files, adds both to files, and returns the sheet's path.
// extra is CSS that is not in site/styles: the classes that style attributes became.
func (b *bundler) styles(files Output, extra string) (string, error) {
	outputs, err := b.sheet("site.css", extra, api.LoaderFile)
	if err != nil {
		return "", err
	}
	sheet := ""
	for name, content := range outputs {
		files[path.Join(assetDir, name)] = content
		if strings.HasSuffix(name, ".css") {
			sheet = path.Join(assetDir, name)
		}
	}
	return sheet, nil
}

// sheet bundles one sheet of site/styles with its imports. Fonts become files or data.
func (b *bundler) sheet(name, extra string, fonts api.Loader) (map[string][]byte, error) {
	options := b.options(nil)
	options.Stdin = &api.StdinOptions{
		Contents:   fmt.Sprintf("@import %q;\n%s", "./"+name, extra),
		ResolveDir: b.site.styles, Sourcefile: "with-classes-" + name, Loader: api.LoaderCSS,
	}
	options.Loader = map[string]api.Loader{".woff2": fonts}
	options.EntryNames, options.AssetNames = "site-[hash]", "[name]-[hash]"
	options.Outdir = filepath.Join(b.site.root, assetDir)
	return b.build(options)
}

// options are those that all bundles share. modules are the sources of made modules, by name.
func (b *bundler) options(modules map[string]string) api.BuildOptions {
	return api.BuildOptions{
		AbsWorkingDir:     b.site.root,
		Bundle:            true,
		Write:             false,
		Metafile:          true,
		Target:            api.ES2022,
		MinifyWhitespace:  true,
		MinifyIdentifiers: true,
		MinifySyntax:      true,
		LegalComments:     api.LegalCommentsNone, // licences.html carries every notice in full
		Charset:           api.CharsetUTF8,
		LogLevel:          api.LogLevelSilent,
		Plugins:           []api.Plugin{b.madeModules(modules), b.palettes(), b.sheetsAsText()},
	}
}

// madeModules answers imports of "hoopsheet:..." .
func (b *bundler) madeModules(modules map[string]string) api.Plugin {
	return api.Plugin{Name: "made-modules", Setup: func(build api.PluginBuild) {
		build.OnResolve(api.OnResolveOptions{Filter: `^hoopsheet:`}, func(args api.OnResolveArgs) (api.OnResolveResult, error) {
			return api.OnResolveResult{Path: args.Path, Namespace: "made"}, nil
		})
		build.OnLoad(api.OnLoadOptions{Filter: `.*`, Namespace: "made"}, func(args api.OnLoadArgs) (api.OnLoadResult, error) {
			if args.Path == "hoopsheet:wasm_exec" {
				raw, err := os.ReadFile(filepath.Join(b.goRoot, "lib", "wasm", "wasm_exec.js"))
				text := string(raw)
				return api.OnLoadResult{Contents: &text, Loader: api.LoaderJS}, err
			}
			source, ok := modules[args.Path]
			if !ok {
				return api.OnLoadResult{}, fmt.Errorf("%s is not to be had in this bundle", args.Path)
			}
			return api.OnLoadResult{Contents: &source, Loader: api.LoaderJS}, nil
		})
	}}
}

// palettes answers @import "palette:page" and "palette:element".
func (b *bundler) palettes() api.Plugin {
	return api.Plugin{Name: "palettes", Setup: func(build api.PluginBuild) {
		build.OnResolve(api.OnResolveOptions{Filter: `^palette:`}, func(args api.OnResolveArgs) (api.OnResolveResult, error) {
			return api.OnResolveResult{Path: args.Path, Namespace: "palette"}, nil
		})
		build.OnLoad(api.OnLoadOptions{Filter: `.*`, Namespace: "palette"}, func(args api.OnLoadArgs) (api.OnLoadResult, error) {
			list, err := loadPalette(b.site)
			text := pagePalette(list)
			if args.Path == "palette:element" {
				text = elementPalette(list)
			}
			return api.OnLoadResult{Contents: &text, Loader: api.LoaderCSS}, err
		})
	}}
}

// sheetsAsText makes a sheet that TypeScript imports its text, bundled and minified.
func (b *bundler) sheetsAsText() api.Plugin {
	return api.Plugin{Name: "sheets-as-text", Setup: func(build api.PluginBuild) {
		build.OnResolve(api.OnResolveOptions{Filter: `\.css$`}, func(args api.OnResolveArgs) (api.OnResolveResult, error) {
			if args.Kind != api.ResolveJSImportStatement || args.PluginData != nil {
				return api.OnResolveResult{}, nil
			}
			found := build.Resolve(args.Path, api.ResolveOptions{
				ResolveDir: args.ResolveDir, Kind: args.Kind, Importer: args.Importer, PluginData: "once",
			})
			if len(found.Errors) > 0 {
				return api.OnResolveResult{Errors: found.Errors}, nil
			}
			return api.OnResolveResult{Path: found.Path, Namespace: "sheet-text"}, nil
		})
		build.OnLoad(api.OnLoadOptions{Filter: `.*`, Namespace: "sheet-text"}, func(args api.OnLoadArgs) (api.OnLoadResult, error) {
			b.notePackage(args.Path)
			options := b.options(nil)
			options.EntryPoints = []string{args.Path}
			options.Outfile = filepath.Join(b.site.root, "out.css")
			outputs, err := b.build(options)
			text := string(outputs["out.css"])
			return api.OnLoadResult{Contents: &text, Loader: api.LoaderText}, err
		})
	}}
}

// build runs esbuild, turns its messages into one error, and returns the outputs by base name.
func (b *bundler) build(options api.BuildOptions) (map[string][]byte, error) {
	result := api.Build(options)
	if faults := slices.Concat(result.Errors, result.Warnings); len(faults) > 0 {
		text := api.FormatMessages(faults, api.FormatMessagesOptions{})
		return nil, fmt.Errorf("%s", strings.Join(text, ""))
	}
	var meta struct{ Inputs map[string]struct{} }
	if err := json.Unmarshal([]byte(result.Metafile), &meta); err != nil {
		return nil, err
	}
	for input := range meta.Inputs {
		b.notePackage(input)
	}
	outputs := map[string][]byte{}
	for _, file := range result.OutputFiles {
		outputs[filepath.Base(file.Path)] = file.Contents
	}
	return outputs, nil
}

var packagePath = regexp.MustCompile(`node_modules/((?:@[^/]+/)?[^/]+)/`)

// notePackage remembers the npm package that a bundled file belongs to.
func (b *bundler) notePackage(file string) {
	if match := packagePath.FindStringSubmatch(filepath.ToSlash(file)); match != nil {
		if b.used == nil {
			b.used = map[string]bool{}
		}
		b.used[match[1]] = true
	}
}

// packages are the npm packages of which something is shipped.
func (b *bundler) packages() []string {
	var list []string
	for name := range b.used {
		list = append(list, name)
	}
	slices.Sort(list)
	return list
}
