/* Small systems of nonlinear equations by KINSOL's globalised Newton method (line search) with an analytic
 * Jacobian. The only file that knows KINSOL. */
#ifndef NW_BASE_NEWTON_H
#define NW_BASE_NEWTON_H

#include "notchwright/status.h"

typedef struct nw_newton nw_newton;

/* residual[n] and jacobian[n][n] (row after row) at unknown[n]. Where they do not exist, a residual that is
 * not finite makes the step shorter. */
typedef void (*nw_newton_equations)(const void *data, const double *unknown, double *residual,
                                    double *jacobian);

enum { NW_NEWTON_MOST = 16 };

/* For systems of `size` (1 to NW_NEWTON_MOST) unknowns. Returns NW_OK or NW_MEMORY. */
nw_status nw_newton_create(size_t size, nw_newton **solver);

/* Solves from the guess in unknown[n], which receives the root.
 *   tolerance  largest residual (max norm) accepted
 * Returns NW_OK, NW_COMPUTE (no root found; `unknown` untouched) or NW_MEMORY. */
nw_status nw_newton_solve(nw_newton *solver, nw_newton_equations equations, const void *data,
                          double tolerance, double *unknown);

void nw_newton_free(nw_newton *solver);

#endif
