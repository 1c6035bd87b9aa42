#!/usr/bin/env bash
# From a fresh Debian 12 (root or sudo) to a theorem that Coq accepts and an appendix as PDF:
# installs what is missing, builds the program without its tests, exports one exemplar, replays it.
#
#   bash exemplars/first-run.sh [EXEMPLAR]
#
# SUMWRIGHT_BUILD names the build folder (default: build), SUMWRIGHT_OUT the folder to write
# (default: out). Exit status 0 when everything went well.
set -euo pipefail
root=$(cd "$(dirname "$0")/.." && pwd)
build=${SUMWRIGHT_BUILD:-$root/build}
out=${SUMWRIGHT_OUT:-$root/out}
claim=${1:-$root/exemplars/equal-faults.toml}

bash "$root/.ci/install.sh" build run
cmake -G Ninja -S "$root" -B "$build" -DCMAKE_BUILD_TYPE=Release -DSUMWRIGHT_TESTS=OFF
cmake --build "$build" --parallel "$(nproc)"

echo
"$build/sumwright" export "$claim" --out "$out"
echo
"$build/sumwright" replay "$out"
echo
# The folder takes the PDF only; what pdflatex leaves beside it goes elsewhere.
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
cp "$out"/appendix*.tex "$work"
for pass in 1 2; do
  if ! (cd "$work" && pdflatex -interaction=nonstopmode -halt-on-error appendix-standalone.tex \
        >"pass-$pass.log"); then
    tail -20 "$work/pass-$pass.log" >&2
    exit 1
  fi
done
cp "$work/appendix-standalone.pdf" "$out/appendix.pdf"

cat <<END
The program                  $build/sumwright
The theorem, for Coq         $out/coq/Claim.v
The appendix, as PDF         $out/appendix.pdf
The appendix, for a paper    $out/appendix.tex
What was to be proved        $out/obligations.txt
END
