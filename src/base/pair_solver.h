/* Two nonlinear equations in two unknowns by KINSOL's globalised Newton method (line search) with an
 * analytic Jacobian. The only file that knows KINSOL. */
#ifndef NW_BASE_PAIR_SOLVER_H
#define NW_BASE_PAIR_SOLVER_H

#include "notchwright/status.h"

typedef struct nw_pair_solver nw_pair_solver;

/* residual[2] and jacobian[row][column] at unknown[2]. */
typedef void (*nw_pair_equations)(const void *data, const double unknown[2], double residual[2],
                                  double jacobian[2][2]);

/* Returns NW_OK or NW_MEMORY. */
nw_status nw_pair_solver_create(nw_pair_solver **solver);

/* Solves from the guess in `unknown`, which receives the root.
 *   tolerance  largest residual (max norm) accepted
 * Returns NW_OK or NW_COMPUTE (no root found), NW_MEMORY. */
nw_status nw_pair_solve(nw_pair_solver *solver, nw_pair_equations equations, const void *data,
                        double tolerance, double unknown[2]);

void nw_pair_solver_free(nw_pair_solver *solver);

#endif
