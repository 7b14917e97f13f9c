# Sourced by the scripts that build: installs missing Debian packages, configures and builds a tree.
# POSIX sh. Run from the top of the checkout.
# shellcheck shell=sh

# What the build needs. gcc only recommends libc6-dev, so it is named.
BUILD_PACKAGES="gcc libc6-dev cmake pkg-config libsundials-dev libyaml-dev libgsl-dev libjansson-dev zlib1g-dev"

# package_present NAME
package_present() {
    [ "$(dpkg-query -W -f='${db:Status-Status}' "$1" 2>/dev/null)" = installed ]
}

# run_quietly LOG COMMAND...: adds the output to LOG and shows all of LOG only when the command fails.
run_quietly() {
    quiet_log=$1
    shift
    if "$@" >>"$quiet_log" 2>&1; then
        return 0
    fi
    cat "$quiet_log" >&2
    echo "Failed: $*" >&2
    return 1
}

# install_packages NAME...: installs those that are missing, and says which.
install_packages() {
    missing=
    if ! command -v dpkg-query >/dev/null 2>&1; then
        echo "Not a Debian system, so nothing is installed. Needed are what Debian calls: $*" >&2
        return 0
    fi
    for package in "$@"; do
        package_present "$package" || missing="$missing $package"
    done
    [ -n "$missing" ] || return 0
    sudo=
    if [ "$(id -u)" -ne 0 ]; then
        if ! command -v sudo >/dev/null 2>&1; then
            echo "Missing Debian packages:$missing" >&2
            echo "Installing them needs root, and there is no sudo here: run this as root." >&2
            return 1
        fi
        sudo=sudo
    fi
    echo "Installing Debian packages and what they depend on:$missing" >&2
    install_log=$(mktemp) || return 1
    installed=0
    # shellcheck disable=SC2086 # a list of words; no word when already root
    run_quietly "$install_log" $sudo apt-get update &&
        run_quietly "$install_log" $sudo env DEBIAN_FRONTEND=noninteractive \
            apt-get install -y --no-install-recommends $missing || installed=$?
    rm -f "$install_log"
    return "$installed"
}

# install_build_packages [NAME...]: those of the build, a build tool if there is none, and NAME...
install_build_packages() {
    builder=
    if ! command -v ninja >/dev/null 2>&1 && ! command -v make >/dev/null 2>&1; then
        builder=ninja-build
    fi
    # shellcheck disable=SC2086 # lists of words
    install_packages $BUILD_PACKAGES $builder "$@"
}

# build_tree DIRECTORY TYPE [CMAKE_OPTION...]: configures and builds quietly.
build_tree() {
    tree=$1
    type=$2
    shift 2
    echo "Building ($type) in $tree/" >&2
    mkdir -p "$tree" && : >"$tree/build.log" || return 1
    # A tree keeps the build tool it was made with.
    if [ ! -e "$tree/CMakeCache.txt" ] && command -v ninja >/dev/null 2>&1; then
        set -- -G Ninja "$@"
    fi
    run_quietly "$tree/build.log" cmake -S . -B "$tree" -DCMAKE_BUILD_TYPE="$type" "$@" &&
        run_quietly "$tree/build.log" cmake --build "$tree" --parallel "${JOBS:-$(nproc)}"
}
