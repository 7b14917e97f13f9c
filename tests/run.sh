#!/bin/sh
# Builds and runs all tests.
#   sh tests/run.sh              as built for use, with debug information, in build-tests/
#   sh tests/run.sh sanitizers   under the address and undefined-behaviour sanitizers, in build-sanitize/
# The last line is the summary of ctest; the exit status is that of ctest.
set -eu
cd "$(dirname "$0")/.."
. tests/setup.sh

case $#,${1-} in
0,) tree=build-tests sanitize=OFF ;;
1,sanitizers) tree=build-sanitize sanitize=ON ;;
*)
    echo "usage: sh tests/run.sh [sanitizers]" >&2
    exit 2
    ;;
esac

install_build_packages libcmocka-dev python3
build_tree "$tree" RelWithDebInfo -DNOTCHWRIGHT_TESTS=ON -DNOTCHWRIGHT_SANITIZE="$sanitize"

# The first undefined behaviour ends a test; by default it would only be printed.
UBSAN_OPTIONS=${UBSAN_OPTIONS:-halt_on_error=1:print_stacktrace=1}
export UBSAN_OPTIONS

log=$tree/ctest.log
status_file=$tree/ctest.status
# sh has no pipefail, so the status goes through a file.
{
    status=0
    ctest --test-dir "$tree" --output-on-failure --no-tests=error \
        --parallel "${JOBS:-$(nproc)}" 2>&1 || status=$?
    echo "$status" >"$status_file"
} | tee "$log"

grep -E '^[0-9]+% tests passed, ' "$log" | tail -n 1
exit "$(cat "$status_file")"
