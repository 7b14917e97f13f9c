#!/bin/sh
# Installs what is missing, builds, and assesses the first example:  sh examples/quickstart.sh
set -eu
cd "$(dirname "$0")/.."
. tests/setup.sh

# shellcheck disable=SC2119 # no packages beyond those of the build
install_build_packages
build_tree build Release

echo "build/notchwright assess examples/forwarder-axle/case.yaml" >&2
exec build/notchwright assess examples/forwarder-axle/case.yaml
