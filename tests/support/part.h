/* A random part for the laws that hold for every part: material, notch curve and life. */
#ifndef TEST_PART_H
#define TEST_PART_H

#include "support/support.h"

enum { TEST_PART_LOAD_MAX = 1500 }; /* MPa, largest |L| it is made for */

typedef struct test_part {
    nw_material material;
    nw_rule_input rule_input;
    const nw_notch_rule *rule;
    const nw_correction *correction;
    nw_notch_curve *curve;
    nw_life *life;
} test_part;

/* With a given correction, or a random one (NULL). Free with test_part_free(). */
test_part test_part_random(test_random *random, const char *correction);
void test_part_free(test_part *part);

/* Damage of one pass of a block after another, the part at rest before the first. */
void test_part_damage(const test_part *part, const nw_event *events, size_t count, double *damage,
                      size_t passes);

/* Random loads, whole MPa times `scale`; a small reach makes ties and mirror images common. */
size_t test_random_loads(test_random *random, double *loads, size_t most);

#endif
