#include "base/pair_solver.h"

#include <kinsol/kinsol.h>
#include <math.h>
#include <nvector/nvector_serial.h>
#include <stdlib.h>
#include <sunlinsol/sunlinsol_dense.h>
#include <sunmatrix/sunmatrix_dense.h>

struct nw_pair_solver {
    SUNContext context;
    N_Vector unknown, scale;
    SUNMatrix matrix;
    SUNLinearSolver linear;
    void *kinsol;
    nw_pair_equations equations;
    const void *data;
};

static int residual_of(N_Vector unknown, N_Vector residual, void *data)
{
    nw_pair_solver *solver = data;
    double jacobian[2][2];
    solver->equations(solver->data, N_VGetArrayPointer(unknown), N_VGetArrayPointer(residual),
                      jacobian);
    const double *r = N_VGetArrayPointer(residual);
    return isfinite(r[0]) && isfinite(r[1]) ? 0 : 1;
}

static int jacobian_of(N_Vector unknown, N_Vector residual, SUNMatrix matrix, void *data,
                       N_Vector work1, N_Vector work2)
{
    (void)residual;
    (void)work1;
    (void)work2;
    nw_pair_solver *solver = data;
    double r[2], jacobian[2][2];
    solver->equations(solver->data, N_VGetArrayPointer(unknown), r, jacobian);
    for (int row = 0; row < 2; row++) {
        for (int column = 0; column < 2; column++) {
            SM_ELEMENT_D(matrix, row, column) = jacobian[row][column];
        }
    }
    return 0;
}

/* The library never prints: what KINSOL would say is told by its return value. */
static void keep_quiet(int code, const char *module, const char *function, char *message,
                       void *data)
{
    (void)code;
    (void)module;
    (void)function;
    (void)message;
    (void)data;
}

static bool set_up(nw_pair_solver *solver)
{
    if (SUNContext_Create(NULL, &solver->context) != 0) {
        return false;
    }
    solver->unknown = N_VNew_Serial(2, solver->context);
    solver->scale = N_VNew_Serial(2, solver->context);
    solver->matrix = SUNDenseMatrix(2, 2, solver->context);
    solver->kinsol = KINCreate(solver->context);
    if (solver->unknown == NULL || solver->scale == NULL || solver->matrix == NULL ||
        solver->kinsol == NULL) {
        return false;
    }
    N_VConst(1.0, solver->scale);
    solver->linear = SUNLinSol_Dense(solver->unknown, solver->matrix, solver->context);
    if (solver->linear == NULL ||
        KINSetErrHandlerFn(solver->kinsol, keep_quiet, NULL) != KIN_SUCCESS ||
        KINInit(solver->kinsol, residual_of, solver->unknown) != KIN_SUCCESS ||
        KINSetUserData(solver->kinsol, solver) != KIN_SUCCESS ||
        KINSetLinearSolver(solver->kinsol, solver->linear, solver->matrix) != KINLS_SUCCESS ||
        KINSetJacFn(solver->kinsol, jacobian_of) != KINLS_SUCCESS) {
        return false;
    }
    KINSetMaxSetupCalls(solver->kinsol, 1);
    KINSetMaxNewtonStep(solver->kinsol, 20.0);
    KINSetFuncNormTol(solver->kinsol, 1e-14);
    KINSetScaledStepTol(solver->kinsol, 1e-15);
    return true;
}

nw_status nw_pair_solver_create(nw_pair_solver **solver)
{
    nw_pair_solver *made = calloc(1, sizeof *made);
    *solver = NULL;
    if (made == NULL) {
        return NW_MEMORY;
    }
    if (!set_up(made)) {
        nw_pair_solver_free(made);
        return NW_MEMORY;
    }
    *solver = made;
    return NW_OK;
}

/* KINSOL's own verdict is about its step; ours is about the residual that is left. */
static bool is_root(const nw_pair_solver *solver, const double unknown[2], double tolerance)
{
    double r[2], jacobian[2][2];
    solver->equations(solver->data, unknown, r, jacobian);
    return fabs(r[0]) <= tolerance && fabs(r[1]) <= tolerance;
}

nw_status nw_pair_solve(nw_pair_solver *solver, nw_pair_equations equations, const void *data,
                        double tolerance, double unknown[2])
{
    double *u = N_VGetArrayPointer(solver->unknown);
    solver->equations = equations;
    solver->data = data;
    u[0] = unknown[0];
    u[1] = unknown[1];
    int flag =
        KINSol(solver->kinsol, solver->unknown, KIN_LINESEARCH, solver->scale, solver->scale);
    if (flag == KIN_MEM_FAIL) {
        return NW_MEMORY;
    }
    if (!is_root(solver, u, tolerance)) {
        return NW_COMPUTE;
    }
    unknown[0] = u[0];
    unknown[1] = u[1];
    return NW_OK;
}

void nw_pair_solver_free(nw_pair_solver *solver)
{
    if (solver == NULL) {
        return;
    }
    if (solver->kinsol != NULL) {
        KINFree(&solver->kinsol);
    }
    if (solver->linear != NULL) {
        SUNLinSolFree(solver->linear);
    }
    if (solver->matrix != NULL) {
        SUNMatDestroy(solver->matrix);
    }
    if (solver->scale != NULL) {
        N_VDestroy(solver->scale);
    }
    if (solver->unknown != NULL) {
        N_VDestroy(solver->unknown);
    }
    if (solver->context != NULL) {
        SUNContext_Free(&solver->context);
    }
    free(solver);
}
