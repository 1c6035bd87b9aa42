#!/usr/bin/env bash
# Installs what is missing, builds, and runs every test. Made for a fresh Debian 12, as root or
# with sudo; where everything is installed it needs no network.
#
#   bash tests/run.sh [CMAKE-OPTION...]
#
# SUMWRIGHT_BUILD names the build folder (default: build), SUMWRIGHT_JOBS the jobs at once
# (default 2), SUMWRIGHT_TEST_LABELS a regular expression of ctest labels (default: all).
# Exit status 0 when all tests pass. A failing run ends with the names of the tests that failed.
set -euo pipefail
root=$(cd "$(dirname "$0")/.." && pwd)
build=${SUMWRIGHT_BUILD:-$root/build}
jobs=${SUMWRIGHT_JOBS:-2}

bash "$root/.ci/install.sh" build run test
cmake -G Ninja -S "$root" -B "$build" -DCMAKE_BUILD_TYPE=Release -DSUMWRIGHT_TESTS=ON "$@"
cmake --build "$build" --parallel "$jobs"

labels=()
[ -z "${SUMWRIGHT_TEST_LABELS:-}" ] || labels=(--label-regex "$SUMWRIGHT_TEST_LABELS")
rm -f "$build/Testing/Temporary/LastTestsFailed.log"
status=0
ctest --test-dir "$build" --output-on-failure --no-tests=error --parallel "$jobs" \
  "${labels[@]}" || status=$?
if [ "$status" != 0 ]; then
  failed="$build/Testing/Temporary/LastTestsFailed.log"
  [ ! -f "$failed" ] || sed 's/^[0-9]*:/failed: /' "$failed"
fi
exit "$status"
