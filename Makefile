# make run       everything on a fresh machine: fetch, build, serve, print the address
# make build     the site in site/dist
# make test      everything: check, build, browser tests
# make check     all tests that need no browser, in about two minutes
# make browser   the browser tests on site/dist; one file: make browser T=site/tests/modes.test.mjs
# make bench     times beside NumPy and SciPy, native and WebAssembly
# make generate  the contract: JSON Schema and TypeScript types of every call
# make accuracy  the accuracy table of the Bessel functions
# make fuzz      every fuzz target for FUZZTIME (10s) each
# make size      what the pages weigh, against the budget
# make clean     take away what was built and fetched

.PHONY: run build test check browser bench generate accuracy fuzz size clean
.PHONY: format vet test-go test-wasm types test-js chromium scipy

run: build
	go run ./site/serve -open

build: site/node_modules/.stamp
	go run ./site/build

# Node packages, as locked. Fetched again whenever the lock is newer.
site/node_modules/.stamp: site/package.json site/package-lock.json site/.npmrc
	cd site && npm ci
	@touch $@

test: check build size browser

check: format vet test-go test-wasm types test-js

format:
	@files="$$(gofmt -l core wasm site/*/*.go)"; test -z "$$files" || { echo "not formatted by gofmt:"; echo "$$files"; exit 1; }

vet:
	go vet ./...
	GOOS=js GOARCH=wasm go vet ./wasm
	GOOS=js GOARCH=wasm go vet -tags browser ./wasm

test-go:
	go test ./...

# Node's Go loader breaks on a long environment, so the test programs get a short one.
test-wasm:
	GOOS=js GOARCH=wasm go test -exec "env -i PATH=$$PATH HOME=$$HOME $$(go env GOROOT)/lib/wasm/go_js_wasm_exec" ./core/... ./wasm

types: site/node_modules/.stamp
	cd site && npx tsc -p tsconfig.json && npx tsc -p tsconfig.worker.json

# Some of the pages' own code is tested without a browser, as tsc turns it into JavaScript.
test-js: site/node_modules/.stamp
	cd site && npx tsc -p tsconfig.json --noEmit false --rootDir src --outDir .cache/ts
	node --test site/tests/unit/

T = site/tests/*.test.mjs
browser: site/node_modules/.stamp chromium
	node --test --test-concurrency=2 --test-timeout=600000 $(T)

size:
	node site/tools/size.mjs

generate: site/node_modules/.stamp
	go run ./site/contract
	node site/contract/types.mjs

accuracy:
	go run ./site/accuracy

bench: scipy
	go run ./site/bench

FUZZTIME = 10s
fuzz:
	@set -eu; for package in $$(go list ./core/...); do \
		for target in $$(go test -list '^Fuzz' $$package | grep '^Fuzz' || true); do \
			echo "$$package $$target"; \
			go test -run '^$$' -fuzz "^$$target$$" -fuzztime $(FUZZTIME) $$package; \
		done; \
	done

# need(program to look for, Debian package, what it is for): installs the package where that may be done, else says what is missing.
need = @$(1) >/dev/null 2>&1 || { \
	if [ "$$(id -u)" = 0 ] && command -v apt-get >/dev/null; then \
		apt-get update -q && DEBIAN_FRONTEND=noninteractive apt-get install -y -q --no-install-recommends $(2); \
	else \
		echo "$(3) needs $(2): install it with your system's packages." >&2; exit 1; \
	fi; }

chromium:
	$(call need,command -v "$${CHROMIUM:-/usr/bin/chromium}",chromium,The browser tests)

scipy:
	$(call need,/usr/bin/python3 -c "import scipy",python3-scipy,make bench)

clean:
	rm -rf site/dist site/node_modules
