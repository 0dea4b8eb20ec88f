#!/bin/sh
# Writes the character tables that our own are held against. Needs GAP with its table library; on Debian:
#   apt-get install --no-install-recommends gap-core gap-character-tables
set -eu
cd "$(dirname "$0")/.."
to=tests/unit/chem/symmetry/gap-tables.json
gap -q -b scripts/gap-tables.g </dev/null >"$to.new"
mv "$to.new" "$to"
npx biome format --write "$to"
