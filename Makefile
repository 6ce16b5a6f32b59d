# make run    everything on a fresh machine: fetch, build, serve, print the address
# make build  the site in site/dist
# make clean  take away what was built and fetched

.PHONY: run build clean

run: build
	go run ./site/serve -open

build: site/node_modules/.stamp
	go run ./site/build

# Node packages, as locked. Fetched again whenever the lock is newer.
site/node_modules/.stamp: site/package.json site/package-lock.json site/.npmrc
	cd site && npm ci
	@touch $@

clean:
	rm -rf site/dist site/node_modules
