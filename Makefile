# What a developer does often. The tests need Go alone: go test ./...

GO      ?= go
BIN     ?= bin/stanchion
DIST    ?= dist
SYSTEMS ?= linux/amd64 linux/arm64 darwin/amd64 darwin/arm64 windows/amd64 windows/arm64
FUZZ    ?= 10s

.PHONY: all build test race bench fuzz-short lint examples release clean

all: build test

# One static program without C, the same bytes wherever it is built.
build:
	CGO_ENABLED=0 $(GO) build -trimpath -o $(BIN) ./cmd/stanchion

test:
	$(GO) test ./...

race:
	CGO_ENABLED=1 $(GO) test -race ./...

bench:
	$(GO) test -run '^$$' -bench . -benchmem ./...

# Every fuzz target for a short while, one after the other: Go runs one at a time.
fuzz-short:
	@for dir in $$(grep -rl --include='*_test.go' '^func Fuzz' . | xargs -n1 dirname | sort -u); do \
		for target in $$(grep -h '^func Fuzz' $$dir/*_test.go | sed 's/func \(Fuzz[A-Za-z0-9_]*\).*/\1/'); do \
			echo "$$dir $$target"; \
			$(GO) test -run '^$$' -fuzz "^$$target\$$" -fuzztime $(FUZZ) $$dir || exit 1; \
		done; \
	done

lint:
	@test -z "$$(gofmt -l $$(git ls-files '*.go'))" || { gofmt -l $$(git ls-files '*.go'); exit 1; }
	$(GO) vet ./...

# The example schedules, made anew.
examples:
	$(GO) run ./examples/make examples

# One archive a system, with times fixed so that the archives are the same
# wherever they are made.
release:
	rm -rf $(DIST)
	@set -e; for system in $(SYSTEMS); do \
		os=$${system%/*}; arch=$${system#*/}; ext=; [ $$os != windows ] || ext=.exe; \
		dir=$(DIST)/stanchion-$$os-$$arch; \
		echo $$dir; mkdir -p $$dir; \
		CGO_ENABLED=0 GOOS=$$os GOARCH=$$arch $(GO) build -trimpath -ldflags='-s -w' -o $$dir/stanchion$$ext ./cmd/stanchion; \
		cp README.md LICENSE $$dir; \
		tar --sort=name --owner=0 --group=0 --numeric-owner --mtime='2024-01-01 00:00Z' -C $(DIST) -czf $$dir.tar.gz stanchion-$$os-$$arch; \
		rm -r $$dir; \
	done

clean:
	rm -rf $(DIST) bin
