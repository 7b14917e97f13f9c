#!/bin/sh
# Every benchmark of docs/benchmarks.md, with its command: sh benchmarks/run.sh BUILD
# Needs about 1 GB of disk in BUILD/benchmark-data. Set SCIPY=1 to time the SciPy script too (it takes long).
set -eu
build=$1
source=$(cd "$(dirname "$0")/.." && pwd)
data=$build/benchmark-data
bin=$build/benchmarks
mkdir -p "$data"

history() { # SAMPLES SPACING FILE
    [ -s "$data/$3" ] || "$bin/bench_make_history" "$1" "$2" "$data/$3"
}
case_of() { # HISTORY: a case beside it
    cat >"$data/$1.yaml" <<END
notchwright: 1
title: Benchmark, $1
material:
  group: steel
  youngs_modulus: 202 GPa
  cyclic_curve: {strength_coefficient: 1258 MPa, hardening_exponent: 0.208}
  strain_life:
    fatigue_strength_coefficient: 948 MPa
    fatigue_strength_exponent: -0.092
    fatigue_ductility_coefficient: 0.26
    fatigue_ductility_exponent: -0.445
notch: {kt: 2.0}
load: [{history: $1, scale: 1.5 MPa}]
life: {mean_stress: swt}
END
}
compare() { # ROUNDS A B
    printf '\n%s\n  against %s\n' "$2" "$3"
    "$bin/bench_compare_commands" "$1" "$2" "$3"
}

history 10000000 8 ten-million.csv
history 10000000 8 ten-million.npy
history 100000000 100 hundred-million.csv
case_of ten-million.csv
case_of ten-million.npy
case_of hundred-million.csv
cd "$data"

echo "Whole process, one thread, against counting the lines of the same file"
compare 9 "$build/notchwright assess ten-million.csv.yaml" "wc -l ten-million.csv"
compare 3 "$build/notchwright assess hundred-million.csv.yaml" "wc -l hundred-million.csv"
echo
echo "The same values as .npy, against reading the file"
compare 9 "$build/notchwright assess ten-million.npy.yaml" "cat ten-million.npy"
echo
echo "Tracking against bare counting, same turning points, one process"
"$bin/bench_tracking" ten-million.csv 25
echo
echo "A look at the notch curve against solving its equation"
"$bin/bench_curve_table"
if [ "${SCIPY:-0}" = 1 ]; then
    echo
    echo "Whole process against the SciPy script, same case"
    compare 1 "$build/notchwright assess ten-million.csv.yaml" \
        "${PYTHON:-python3} $source/tests/reference/assess_reference.py ten-million.csv.yaml"
fi
