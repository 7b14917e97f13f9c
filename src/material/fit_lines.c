/* A straight line by least squares, its limits, band and test of linearity (ASTM E739-10; formulas and example
 * from memory, the printed results recovered). */
#include "base/quantiles.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>

static double mean_of(const double *values, size_t count)
{
    double sum = 0.0;
    for (size_t i = 0; i < count; i++) {
        sum += values[i];
    }
    double mean = sum / (double)count, rest = 0.0;
    for (size_t i = 0; i < count; i++) {
        rest += values[i] - mean;
    }
    return mean + rest / (double)count;
}

static void slope_and_scatter(const double *x, const double *y, size_t count, nw_line *line)
{
    double sxy = 0.0, rest = 0.0;
    line->x_min = line->x_max = x[0];
    for (size_t i = 0; i < count; i++) {
        double dx = x[i] - line->x_mean;
        line->sxx += dx * dx;
        sxy += dx * (y[i] - line->y_mean);
        line->x_min = fmin(line->x_min, x[i]);
        line->x_max = fmax(line->x_max, x[i]);
    }
    line->b = sxy / line->sxx;
    line->a = line->y_mean - line->b * line->x_mean;
    for (size_t i = 0; i < count; i++) {
        double residual = (y[i] - line->y_mean) - line->b * (x[i] - line->x_mean);
        rest += residual * residual;
    }
    line->sd = line->degrees > 0.0 ? sqrt(rest / line->degrees) : NAN;
}

static void limits_of(nw_line *line)
{
    double n = (double)line->points, s = line->sd;
    line->a_standard_error = s * sqrt(1.0 / n + line->x_mean * line->x_mean / line->sxx);
    line->b_standard_error = s / sqrt(line->sxx);
    line->a_b_covariance = -s * s * line->x_mean / line->sxx;
    double t =
        line->degrees > 0.0 ? nw_t_quantile(0.5 + 0.5 * line->confidence, line->degrees) : NAN;
    line->a_low = line->a - t * line->a_standard_error;
    line->a_high = line->a + t * line->a_standard_error;
    line->b_low = line->b - t * line->b_standard_error;
    line->b_high = line->b + t * line->b_standard_error;
}

typedef struct group {
    double count, x, y; /* sums, then means */
    double pure;        /* sum of squares about the mean */
} group;

static void linearity(const double *x, const double *y, const size_t *level, size_t count,
                      group *groups, nw_line *line)
{
    for (size_t i = 0; i < count; i++) {
        group *g = &groups[level[i]];
        g->count += 1.0;
        g->x += x[i] - line->x_mean;
        g->y += y[i] - line->y_mean;
    }
    for (size_t i = 0; i < line->levels; i++) {
        groups[i].x /= groups[i].count;
        groups[i].y /= groups[i].count;
    }
    double lack = 0.0, pure = 0.0;
    for (size_t i = 0; i < count; i++) {
        const group *g = &groups[level[i]];
        double residual = (y[i] - line->y_mean) - g->y;
        pure += residual * residual;
    }
    for (size_t i = 0; i < line->levels; i++) {
        double residual = groups[i].y - line->b * groups[i].x;
        lack += groups[i].count * residual * residual;
    }
    double *degrees = line->f_degrees;
    if (degrees[0] > 0.0 && degrees[1] > 0.0 && pure > 0.0) {
        line->f_linearity = (lack / degrees[0]) / (pure / degrees[1]);
        line->f_critical = nw_f_quantile(0.95, degrees[0], degrees[1]);
    }
}

/* Levels may be numbered with gaps (points left out): numbers them anew. */
static size_t renumber(size_t *level, size_t count, size_t most, size_t *work)
{
    for (size_t i = 0; i <= most; i++) {
        work[i] = 0;
    }
    for (size_t i = 0; i < count; i++) {
        work[level[i]] = 1;
    }
    size_t levels = 0;
    for (size_t i = 0; i <= most; i++) {
        work[i] = work[i] != 0 ? levels++ : 0;
    }
    for (size_t i = 0; i < count; i++) {
        level[i] = work[level[i]];
    }
    return levels;
}

static nw_status own_levels(const double *x, const size_t *given, size_t count, size_t *level,
                            size_t *levels)
{
    if (given == NULL) {
        /* x is a logarithm, of any sign: its exponential is above 0 and has the same ties. */
        double *values = malloc(count * sizeof *values);
        if (values == NULL) {
            return NW_MEMORY;
        }
        for (size_t i = 0; i < count; i++) {
            values[i] = exp(x[i]);
        }
        nw_status status = nw_levels_of(values, count, 0.0, level, levels);
        free(values);
        return status;
    }
    size_t most = 0;
    for (size_t i = 0; i < count; i++) {
        level[i] = given[i];
        most = given[i] > most ? given[i] : most;
    }
    size_t *work = malloc((most + 1) * sizeof *work);
    if (work == NULL) {
        return NW_MEMORY;
    }
    *levels = renumber(level, count, most, work);
    free(work);
    return NW_OK;
}

static nw_status check_linearity(const double *x, const double *y, const size_t *given,
                                 size_t count, nw_line *line)
{
    size_t *level = malloc(count * sizeof *level);
    group *groups = NULL;
    nw_status status =
        level == NULL ? NW_MEMORY : own_levels(x, given, count, level, &line->levels);
    if (status == NW_OK) {
        groups = calloc(line->levels, sizeof *groups);
        status = groups == NULL ? NW_MEMORY : NW_OK;
    }
    if (status == NW_OK) {
        double n = (double)count, l = (double)line->levels;
        line->f_degrees[0] = l - 2.0;
        line->f_degrees[1] = n - l;
        line->replication_percent = 100.0 * (1.0 - l / n);
        linearity(x, y, level, count, groups, line);
    }
    free(groups);
    free(level);
    return status;
}

nw_status nw_line_fit(const double *x, const double *y, const size_t *level, size_t count,
                      double confidence, nw_line *line)
{
    *line = (nw_line){.points = count,
                      .degrees = (double)count - 2.0,
                      .confidence = confidence,
                      .f_linearity = NAN,
                      .f_critical = NAN};
    if (count < 2) {
        return NW_COMPUTE;
    }
    line->x_mean = mean_of(x, count);
    line->y_mean = mean_of(y, count);
    slope_and_scatter(x, y, count, line);
    if (!(line->x_max > line->x_min) || !isfinite(line->b)) {
        return NW_COMPUTE;
    }
    limits_of(line);
    return check_linearity(x, y, level, count, line);
}

double nw_line_band(const nw_line *line, double x, double confidence, double *half_width)
{
    double dx = x - line->x_mean;
    *half_width = NAN;
    if (line->degrees > 0.0) {
        double f = nw_f_quantile(confidence, 2.0, line->degrees);
        *half_width =
            sqrt(2.0 * f) * line->sd * sqrt(1.0 / (double)line->points + dx * dx / line->sxx);
    }
    return line->y_mean + line->b * dx;
}

/* (a + b x - y)^2 <= t^2 var: a quadratic inequality in d = x - xmean with g = (t se_b/b)^2. */
double nw_line_inverse(const nw_line *line, double y, double limits[2])
{
    double d = (y - line->y_mean) / line->b;
    limits[0] = limits[1] = NAN;
    if (line->degrees > 0.0) {
        double t = nw_t_quantile(0.5 + 0.5 * line->confidence, line->degrees);
        double ratio = t * line->b_standard_error / line->b, rest = 1.0 - ratio * ratio;
        double spread = fabs(t * line->sd / line->b) *
                        sqrt(fmax(0.0, rest / (double)line->points + d * d / line->sxx));
        limits[0] = rest > 0.0 ? line->x_mean + (d - spread) / rest : -INFINITY;
        limits[1] = rest > 0.0 ? line->x_mean + (d + spread) / rest : INFINITY;
    }
    return line->x_mean + d;
}
