#!/bin/sh
# Checks that the C code is laid out as .clang-format says:  sh tests/format.sh
# To lay a file out:  clang-format -i FILE
set -eu
cd "$(dirname "$0")/.."
. tests/setup.sh

if ! command -v clang-format >/dev/null 2>&1; then
    install_packages clang-format
fi

folders=
for folder in src include tests benchmarks; do
    [ ! -d "$folder" ] || folders="$folders $folder"
done
# shellcheck disable=SC2086 # a list of words
find $folders -type f \( -name '*.c' -o -name '*.h' \) -exec clang-format --dry-run -Werror {} + || {
    echo "Format: the files named above differ from .clang-format"
    exit 1
}
echo "Format: all C files are laid out as .clang-format says"
