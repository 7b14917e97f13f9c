#include "base/small_matrix.h"

#include <math.h>
#include <string.h>

/* A pivot this small against its diagonal element is rounding, not information. */
static const double least_pivot = 1e-13;

bool nw_small_factor(double *matrix, size_t n)
{
    for (size_t j = 0; j < n; j++) {
        double diagonal = matrix[j * n + j], pivot = diagonal;
        for (size_t k = 0; k < j; k++) {
            pivot -= matrix[j * n + k] * matrix[j * n + k];
        }
        if (!(diagonal > 0.0) || !(pivot > least_pivot * diagonal)) {
            return false;
        }
        double root = sqrt(pivot);
        matrix[j * n + j] = root;
        for (size_t i = j + 1; i < n; i++) {
            double sum = matrix[i * n + j];
            for (size_t k = 0; k < j; k++) {
                sum -= matrix[i * n + k] * matrix[j * n + k];
            }
            matrix[i * n + j] = sum / root;
        }
    }
    return true;
}

void nw_small_solve(const double *factor, size_t n, double *right)
{
    for (size_t i = 0; i < n; i++) {
        for (size_t k = 0; k < i; k++) {
            right[i] -= factor[i * n + k] * right[k];
        }
        right[i] /= factor[i * n + i];
    }
    for (size_t i = n; i-- > 0;) {
        for (size_t k = i + 1; k < n; k++) {
            right[i] -= factor[k * n + i] * right[k];
        }
        right[i] /= factor[i * n + i];
    }
}

bool nw_small_inverse(const double *matrix, size_t n, double *inverse)
{
    double scale[NW_SMALL_MOST], factor[NW_SMALL_MOST * NW_SMALL_MOST];
    for (size_t i = 0; i < n; i++) {
        if (!(matrix[i * n + i] > 0.0)) {
            return false;
        }
        scale[i] = 1.0 / sqrt(matrix[i * n + i]);
    }
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < n; j++) {
            factor[i * n + j] = matrix[i * n + j] * scale[i] * scale[j];
        }
    }
    if (!nw_small_factor(factor, n)) {
        return false;
    }
    for (size_t j = 0; j < n; j++) {
        double column[NW_SMALL_MOST] = {0.0};
        column[j] = 1.0;
        nw_small_solve(factor, n, column);
        for (size_t i = 0; i < n; i++) {
            inverse[i * n + j] = column[i] * scale[i] * scale[j];
        }
    }
    return true;
}

double nw_small_form(const double *matrix, size_t n, const double *v)
{
    double sum = 0.0;
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < n; j++) {
            sum += v[i] * matrix[i * n + j] * v[j];
        }
    }
    return sum;
}
