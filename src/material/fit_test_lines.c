/* The lines of a test programme: plastic (Coffin-Manson), elastic (Basquin) and cyclic, each from the tests that
 * can speak to it. */
#include "base/small_matrix.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

static const char *const no_runouts = "run-out";
static const char *const too_small = "plastic strain below the least that is used";
static const char *const not_known = "amplitude not known";

typedef enum which { PLASTIC, ELASTIC, CYCLIC } which;

/* Why a test is not on a line; NULL when it is. */
static const char *left_out(const nw_fit_work *work, const nw_fit_test *t, which line)
{
    if (line != CYCLIC && t->runout) {
        return no_runouts;
    }
    if (line != PLASTIC && isnan(t->stress_mpa)) {
        return not_known;
    }
    if (line != ELASTIC && isnan(t->plastic)) {
        return not_known;
    }
    bool small = !(t->plastic >= work->fit->options.least_plastic_strain && t->plastic > 0.0);
    return line != ELASTIC && small ? too_small : NULL;
}

typedef struct points {
    double *x, *y;
    size_t *level;
    size_t count;
} points;

static bool make_room(points *p, size_t count, nw_fit_line *line)
{
    p->x = calloc(count, sizeof *p->x);
    p->y = calloc(count, sizeof *p->y);
    p->level = calloc(count, sizeof *p->level);
    line->left_out = malloc(count * sizeof *line->left_out);
    return p->x != NULL && p->y != NULL && p->level != NULL && line->left_out != NULL;
}

static void choose(const nw_fit_work *work, which kind, points *p, nw_fit_line *line)
{
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        const char *reason = left_out(work, t, kind);
        if (reason != NULL) {
            line->left_out[line->left_out_count++] = (nw_fit_left_out){t->index, reason};
            continue;
        }
        p->x[p->count] = log10(kind == ELASTIC ? t->stress_mpa : t->plastic);
        p->y[p->count] = kind == CYCLIC ? log10(t->stress_mpa) : t->log10_life;
        p->level[p->count++] = t->level;
    }
}

static nw_status fit_line(nw_fit_work *work, which kind, nw_fit_line *line)
{
    points p = {.count = 0};
    nw_status status = NW_MEMORY;
    if (make_room(&p, work->count, line)) {
        choose(work, kind, &p, line);
        status = nw_line_fit(p.x, p.y, p.level, p.count, work->fit->options.limits, &line->line);
        line->available = status == NW_OK && line->line.b != 0.0;
        if (!line->available) {
            snprintf(line->why, sizeof line->why, "%zu test%s can be used, at %s", p.count,
                     p.count == 1 ? "" : "s",
                     p.count < 2 ? "least two amplitudes are needed" : "one amplitude only");
        }
        status = status == NW_COMPUTE ? NW_OK : status;
    }
    free(p.x);
    free(p.y);
    free(p.level);
    return status;
}

/* ---- covariance of both lines ---- */

static void add_row(double sums[4], double left, double right)
{
    sums[0] += 1.0;
    sums[1] += right;
    sums[2] += left;
    sums[3] += left * right;
}

/* Both lines have the same lives for their y, so their errors go together. */
static void sum_up(nw_fit_work *work)
{
    nw_fit_sums *s = &work->sums;
    const nw_line *elastic = &work->fit->elastic.line, *plastic = &work->fit->plastic.line;
    double products = 0.0;
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        bool on_elastic = left_out(work, t, ELASTIC) == NULL;
        bool on_plastic = left_out(work, t, PLASTIC) == NULL;
        double xe = log10(t->stress_mpa), xp = log10(t->plastic);
        if (on_elastic) {
            add_row(s->elastic, xe, xe);
        }
        if (on_plastic) {
            add_row(s->plastic, xp, xp);
        }
        if (on_elastic && on_plastic) {
            add_row(s->cross, xe, xp);
            products += (t->log10_life - elastic->a - elastic->b * xe) *
                        (t->log10_life - plastic->a - plastic->b * xp);
        }
    }
    s->elastic_variance = elastic->sd * elastic->sd;
    s->plastic_variance = plastic->sd * plastic->sd;
    double most = elastic->sd * plastic->sd;
    s->cross_covariance = s->cross[0] > 2.0 ? products / (s->cross[0] - 2.0) : 0.0;
    s->cross_covariance = fmax(-most, fmin(most, s->cross_covariance));
}

/* d(ln coefficient, exponent)/d(a, b) of a line: ln coefficient = -(a + log10 2) ln 10/b, exponent = 1/b. */
static void derivatives(const nw_line *line, double d[4])
{
    double b = line->b;
    d[0] = -M_LN10 / b;
    d[1] = (line->a + log10(2.0)) * M_LN10 / (b * b);
    d[2] = 0.0;
    d[3] = -1.0 / (b * b);
}

/* out = left middle right^T of 2 x 2 matrices. */
static void sandwich(const double left[4], const double middle[4], const double right[4],
                     double out[4])
{
    for (int i = 0; i < 2; i++) {
        for (int j = 0; j < 2; j++) {
            out[2 * i + j] = 0.0;
            for (int k = 0; k < 2; k++) {
                for (int m = 0; m < 2; m++) {
                    out[2 * i + j] += left[2 * i + k] * middle[2 * k + m] * right[2 * j + m];
                }
            }
        }
    }
}

bool nw_fit_lines_covariance(const nw_fit_sums *s, const nw_line *elastic, const nw_line *plastic,
                             double covariance[16])
{
    double ie[4], ip[4], mixed[4], de[4], dp[4], block[4];
    if (!nw_small_inverse(s->elastic, 2, ie) || !nw_small_inverse(s->plastic, 2, ip)) {
        return false;
    }
    derivatives(elastic, de);
    derivatives(plastic, dp);
    sandwich(ie, s->cross, ip, mixed); /* inverses are symmetric */
    const double *blocks[3] = {ie, ip, mixed};
    const double *left[3] = {de, dp, de}, *right[3] = {de, dp, dp};
    const double factor[3] = {s->elastic_variance, s->plastic_variance, s->cross_covariance};
    const int row[3] = {0, 2, 0}, column[3] = {0, 2, 2};
    for (int k = 0; k < 3; k++) {
        sandwich(left[k], blocks[k], right[k], block);
        for (int i = 0; i < 2; i++) {
            for (int j = 0; j < 2; j++) {
                double value = factor[k] * block[2 * i + j];
                covariance[4 * (row[k] + i) + column[k] + j] = value;
                covariance[4 * (column[k] + j) + row[k] + i] = value;
            }
        }
    }
    return true;
}

void nw_fit_lines_theta(const nw_fit *fit, double theta[4])
{
    const nw_line *elastic = &fit->elastic.line, *plastic = &fit->plastic.line;
    theta[0] = -(elastic->a + log10(2.0)) * M_LN10 / elastic->b - log(fit->youngs_modulus_mpa);
    theta[1] = 1.0 / elastic->b;
    theta[2] = -(plastic->a + log10(2.0)) * M_LN10 / plastic->b;
    theta[3] = 1.0 / plastic->b;
}

nw_status nw_fit_lines(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    nw_status status = fit_line(work, PLASTIC, &fit->plastic);
    if (status == NW_OK) {
        status = fit_line(work, ELASTIC, &fit->elastic);
    }
    if (status == NW_OK) {
        status = fit_line(work, CYCLIC, &fit->cyclic);
    }
    if (status == NW_OK && fit->plastic.available && fit->elastic.available) {
        sum_up(work);
    }
    return status;
}
