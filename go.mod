module hoopsheet

go 1.26.0

ignore ./site/node_modules

require (
	github.com/evanw/esbuild v0.28.2
	github.com/google/jsonschema-go v0.4.3
	github.com/hack-pad/go-indexeddb v0.3.2
	github.com/yuin/goldmark v1.8.7
	gonum.org/v1/gonum v0.17.0
)

require (
	github.com/hack-pad/safejs v0.1.0 // indirect
	golang.org/x/sys v0.4.0 // indirect
)
