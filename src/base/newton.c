#include "base/newton.h"

#include "base/vector_pool.h"

#include <kinsol/kinsol.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>
#include <sunlinsol/sunlinsol_dense.h>
#include <sunmatrix/sunmatrix_dense.h>

struct nw_newton {
    size_t size;
    SUNContext context;
    nw_vector_pool pool;
    N_Vector unknown, scale;
    SUNMatrix matrix;
    SUNLinearSolver linear;
    void *kinsol;
    nw_newton_equations equations;
    const void *data;
};

static bool all_finite(const double *values, size_t count)
{
    for (size_t i = 0; i < count; i++) {
        if (!isfinite(values[i])) {
            return false;
        }
    }
    return true;
}

static int residual_of(N_Vector unknown, N_Vector residual, void *data)
{
    nw_newton *solver = data;
    double jacobian[NW_NEWTON_MOST * NW_NEWTON_MOST];
    double *r = N_VGetArrayPointer(residual);
    solver->equations(solver->data, N_VGetArrayPointer(unknown), r, jacobian);
    return all_finite(r, solver->size) ? 0 : 1;
}

static int jacobian_of(N_Vector unknown, N_Vector residual, SUNMatrix matrix, void *data,
                       N_Vector work1, N_Vector work2)
{
    (void)residual;
    (void)work1;
    (void)work2;
    nw_newton *solver = data;
    double r[NW_NEWTON_MOST], jacobian[NW_NEWTON_MOST * NW_NEWTON_MOST];
    solver->equations(solver->data, N_VGetArrayPointer(unknown), r, jacobian);
    for (size_t row = 0; row < solver->size; row++) {
        for (size_t column = 0; column < solver->size; column++) {
            SM_ELEMENT_D(matrix, row, column) = jacobian[row * solver->size + column];
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

/* SUNContext_Create uses what it allocates without asking whether it got it; it needs far less than this. */
static bool memory_is_left(void)
{
    void *volatile probe = malloc(1 << 14);
    bool left = probe != NULL;
    free(probe);
    return left;
}

static bool set_up(nw_newton *solver)
{
    sunindextype size = (sunindextype)solver->size;
    if (!memory_is_left() || SUNContext_Create(NULL, &solver->context) != 0) {
        solver->context = NULL; /* a half-made one cannot be freed */
        return false;
    }
    if (!nw_vector_pool_fill(&solver->pool, size, solver->context)) {
        return false;
    }
    solver->unknown = nw_vector_pool_take(&solver->pool);
    solver->scale = nw_vector_pool_take(&solver->pool);
    solver->matrix = SUNDenseMatrix(size, size, solver->context);
    solver->kinsol = KINCreate(solver->context);
    if (solver->matrix == NULL || solver->kinsol == NULL) {
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

nw_status nw_newton_create(size_t size, nw_newton **solver)
{
    nw_newton *made = calloc(1, sizeof *made);
    *solver = NULL;
    if (made == NULL) {
        return NW_MEMORY;
    }
    made->size = size;
    if (!set_up(made)) {
        nw_newton_free(made);
        return NW_MEMORY;
    }
    *solver = made;
    return NW_OK;
}

/* KINSOL's own verdict is about its step; ours is about the residual that is left. */
static bool is_root(const nw_newton *solver, const double *unknown, double tolerance)
{
    double r[NW_NEWTON_MOST], jacobian[NW_NEWTON_MOST * NW_NEWTON_MOST];
    solver->equations(solver->data, unknown, r, jacobian);
    for (size_t i = 0; i < solver->size; i++) {
        if (!(fabs(r[i]) <= tolerance)) {
            return false;
        }
    }
    return true;
}

nw_status nw_newton_solve(nw_newton *solver, nw_newton_equations equations, const void *data,
                          double tolerance, double *unknown)
{
    double *u = N_VGetArrayPointer(solver->unknown);
    size_t bytes = solver->size * sizeof *u;
    solver->equations = equations;
    solver->data = data;
    memcpy(u, unknown, bytes);
    int flag =
        KINSol(solver->kinsol, solver->unknown, KIN_LINESEARCH, solver->scale, solver->scale);
    if (flag == KIN_MEM_FAIL) {
        return NW_MEMORY;
    }
    if (!is_root(solver, u, tolerance)) {
        return NW_COMPUTE;
    }
    memcpy(unknown, u, bytes);
    return NW_OK;
}

void nw_newton_free(nw_newton *solver)
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
    nw_vector_pool_free(&solver->pool);
    if (solver->context != NULL) {
        SUNContext_Free(&solver->context);
    }
    free(solver);
}
