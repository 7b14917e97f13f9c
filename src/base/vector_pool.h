/* SUNDIALS vectors from a pool that is filled beforehand. The solver clones vectors while it sets itself up and
 * takes for granted that this works (N_VClone writes into what it gets); with clones from a pool, running out
 * of memory is found here, where it can be reported. */
#ifndef NW_BASE_VECTOR_POOL_H
#define NW_BASE_VECTOR_POOL_H

#include <stdbool.h>
#include <sundials/sundials_nvector.h>

enum { NW_POOL_VECTORS = 16 };

typedef struct nw_vector_pool {
    N_Vector all[NW_POOL_VECTORS];
    N_Vector unused[NW_POOL_VECTORS];
    int unused_count;
} nw_vector_pool;

/* Fills the pool with vectors of `size` doubles; false when memory ran out. The pool must not move. */
bool nw_vector_pool_fill(nw_vector_pool *pool, sunindextype size, SUNContext context);

/* Takes a vector; N_VDestroy gives it back. */
N_Vector nw_vector_pool_take(nw_vector_pool *pool);

void nw_vector_pool_free(nw_vector_pool *pool);

#endif
