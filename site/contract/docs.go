package main

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"reflect"
	"strings"

	"github.com/google/jsonschema-go/jsonschema"
)

// docComments holds the doc comments of the core's struct types and fields:
// by "package.Type" and "package.Type.member".
type docComments map[string]string

// readDocs parses every package of core/.
func readDocs(root string) (docComments, error) {
	docs := docComments{}
	err := filepath.WalkDir(filepath.Join(root, "core"), func(path string, entry fs.DirEntry, err error) error {
		if err != nil || entry.IsDir() || !strings.HasSuffix(path, ".go") || strings.HasSuffix(path, "_test.go") {
			return err
		}
		file, err := parser.ParseFile(token.NewFileSet(), path, nil, parser.ParseComments)
		if err != nil {
			return err
		}
		for _, decl := range file.Decls {
			if general, ok := decl.(*ast.GenDecl); ok && general.Tok == token.TYPE {
				docs.addTypes(file.Name.Name, general)
			}
		}
		return nil
	})
	return docs, err
}

func (d docComments) addTypes(pkg string, general *ast.GenDecl) {
	for _, spec := range general.Specs {
		typeSpec := spec.(*ast.TypeSpec)
		key := pkg + "." + typeSpec.Name.Name
		doc := typeSpec.Doc
		if doc == nil && len(general.Specs) == 1 {
			doc = general.Doc
		}
		d[key] = oneLine(doc)
		structure, ok := typeSpec.Type.(*ast.StructType)
		if !ok {
			continue
		}
		for _, field := range structure.Fields.List {
			for _, name := range field.Names {
				d[key+"."+name.Name] = oneLine(field.Doc)
			}
		}
	}
}

// describe puts the doc comments of a type into its schema.
func describe(schema *jsonschema.Schema, t reflect.Type, docs docComments) {
	key := t.PkgPath()[strings.LastIndexByte(t.PkgPath(), '/')+1:] + "." + t.Name()
	schema.Description = docs[key]
	if t.Kind() != reflect.Struct {
		return
	}
	for i := range t.NumField() {
		field := t.Field(i)
		name, _, _ := strings.Cut(field.Tag.Get("json"), ",")
		if property := schema.Properties[name]; property != nil {
			property.Description = docs[key+"."+field.Name]
		}
	}
}

func oneLine(group *ast.CommentGroup) string {
	return strings.Join(strings.Fields(group.Text()), " ")
}
