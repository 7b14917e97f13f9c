/* The methods for Kf, and what holds for all of them: 1 <= Kf <= Kt. */
#include "base/text.h"
#include "notch/sensitivities.h"

#include <math.h>
#include <stdio.h>
#include <string.h>

static const nw_sensitivity *const records[] = {
    &nw_sensitivity_peterson,
    &nw_sensitivity_neuber,
    &nw_sensitivity_gradient,
    &nw_sensitivity_guideline,
};

const nw_sensitivity *nw_sensitivity_at(size_t index)
{
    return index < sizeof records / sizeof records[0] ? records[index] : NULL;
}

const nw_sensitivity *nw_sensitivity_find(const char *key)
{
    const nw_sensitivity *record;
    for (size_t i = 0; (record = nw_sensitivity_at(i)) != NULL; i++) {
        if (strcmp(record->key, key) == 0) {
            return record;
        }
    }
    return NULL;
}

bool nw_sensitivity_needs(double value, const char *what, char *why, size_t capacity)
{
    if (value > 0.0) {
        return true;
    }
    snprintf(why, capacity, "it needs %s", what);
    return false;
}

/* Methods see the notch effect alone, Kt over the plain stress. */
static void clamp(nw_kf *result, double kf, double kt, double plain)
{
    result->clamped = !(kf >= 1.0 && kf <= kt);
    double held = kf > kt ? kt : kf >= 1.0 ? kf : 1.0;
    result->kf = plain * held;
    result->q = kt > 1.0 ? (held - 1.0) / (kt - 1.0) : NAN;
}

nw_kf nw_kf_evaluate(const nw_sensitivity *record, const nw_sensitivity_input *input,
                     bool extrapolate)
{
    nw_kf result = {.record = record, .kf = NAN, .q = NAN};
    nw_sensitivity_input alone = *input;
    alone.kt = input->kt / input->plain;
    double kf = NAN;
    if (!record->evaluate(&alone, &kf, result.reason, sizeof result.reason)) {
        return result;
    }
    result.in_range = result.reason[0] == '\0';
    result.beyond_range = !result.in_range;
    result.applies = (result.in_range || extrapolate) && !isnan(kf);
    if (result.applies) {
        clamp(&result, kf, alone.kt, input->plain);
    }
    return result;
}
