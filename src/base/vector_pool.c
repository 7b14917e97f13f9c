#include "base/vector_pool.h"

#include <nvector/nvector_serial.h>
#include <stdlib.h>

/* A serial vector's content with the pool behind it: the serial operations see the first part only. */
typedef struct pooled {
    struct _N_VectorContent_Serial serial;
    nw_vector_pool *pool;
} pooled;

static pooled *content_of(N_Vector vector)
{
    return vector->content;
}

N_Vector nw_vector_pool_take(nw_vector_pool *pool)
{
    return pool->unused_count == 0 ? NULL : pool->unused[--pool->unused_count];
}

static N_Vector clone(N_Vector vector)
{
    return nw_vector_pool_take(content_of(vector)->pool);
}

static void give_back(N_Vector vector)
{
    nw_vector_pool *pool = content_of(vector)->pool;
    pool->unused[pool->unused_count++] = vector;
}

static void free_vector(N_Vector vector)
{
    if (vector != NULL) {
        if (vector->content != NULL) {
            free(content_of(vector)->serial.data);
        }
        free(vector->content);
        vector->content = NULL;
        N_VFreeEmpty(vector);
    }
}

static N_Vector new_vector(nw_vector_pool *pool, N_Vector model, sunindextype size,
                           SUNContext context)
{
    N_Vector vector = N_VNewEmpty(context);
    pooled *content = calloc(1, sizeof *content);
    double *data = calloc((size_t)size, sizeof *data);
    if (vector == NULL || content == NULL || data == NULL || N_VCopyOps(model, vector) != 0) {
        free_vector(vector);
        free(content);
        free(data);
        return NULL;
    }
    content->serial.length = size;
    content->serial.own_data = SUNTRUE;
    content->serial.data = data;
    content->pool = pool;
    vector->content = content;
    vector->ops->nvclone = clone;
    vector->ops->nvdestroy = give_back;
    return vector;
}

bool nw_vector_pool_fill(nw_vector_pool *pool, sunindextype size, SUNContext context)
{
    N_Vector model = N_VNewEmpty_Serial(size, context);
    for (int i = 0; model != NULL && i < NW_POOL_VECTORS; i++) {
        pool->all[i] = new_vector(pool, model, size, context);
        if (pool->all[i] == NULL) {
            break;
        }
        pool->unused[pool->unused_count++] = pool->all[i];
    }
    if (model != NULL) {
        N_VDestroy(model);
    }
    return pool->unused_count == NW_POOL_VECTORS;
}

void nw_vector_pool_free(nw_vector_pool *pool)
{
    for (int i = 0; i < NW_POOL_VECTORS; i++) {
        free_vector(pool->all[i]);
        pool->all[i] = NULL;
    }
    pool->unused_count = 0;
}
