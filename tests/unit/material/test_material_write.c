/* A material written and read again is the same, bit by bit. */
#include "support/support.h"

#define SAME(member) assert_true(same(written->member, read->member, #member))

static bool same(double a, double b, const char *name)
{
    bool equal = (isnan(a) && isnan(b)) || a == b;
    if (!equal) {
        print_error("%s: wrote %.17g, read %.17g\n", name, a, b);
    }
    return equal;
}

static void assert_same(const nw_material *written, const nw_material *read)
{
    assert_string_equal(written->name, read->name);
    assert_string_equal(written->source, read->source);
    assert_string_equal(written->note, read->note);
    assert_int_equal(written->group, read->group);
    assert_int_equal(written->basis, read->basis);
    SAME(youngs_modulus_mpa);
    SAME(poisson_ratio);
    SAME(yield_strength_mpa);
    SAME(ultimate_strength_mpa);
    SAME(reduction_of_area);
    SAME(hardness_hb);
    SAME(fracture_stress_mpa);
    SAME(fracture_strain);
    SAME(strength_coefficient_mpa);
    SAME(hardening_exponent);
    SAME(fatigue_strength_coefficient_mpa);
    SAME(fatigue_strength_exponent);
    SAME(fatigue_ductility_coefficient);
    SAME(fatigue_ductility_exponent);
    SAME(endurance_strain_amplitude);
    SAME(endurance_cycles);
    SAME(log10_life_sd);
    SAME(scatter_tests);
    for (int i = 0; i < 2; i++) {
        SAME(valid_cycles[i]);
        SAME(valid_strain_amplitude[i]);
    }
}

static nw_material read_back(const nw_material *material)
{
    test_scratch scratch = test_scratch_create();
    const char *path = test_scratch_path(&scratch, "written.yaml");
    FILE *file = fopen(path, "wb");
    assert_non_null(file);
    assert_int_equal(nw_material_write(file, material), NW_OK);
    assert_int_equal(fclose(file), 0);
    nw_material read;
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_status status = nw_material_read(path, &read, &diagnostics);
    if (status != NW_OK) {
        fail_msg("%s", diagnostics.items[0].message);
    }
    test_scratch_remove(&scratch);
    return read;
}

/* A value below 1 with all the digits a double has. */
static double digits(test_random *random, double low, double high)
{
    return test_random_between(random, low, high);
}

static nw_material random_material(test_random *random)
{
    nw_material m = {
        .group = (nw_group)test_random_int(random, 0, NW_OTHER_GROUP),
        .basis = (nw_basis)test_random_int(random, 0, NW_ESTIMATED),
        .youngs_modulus_mpa = digits(random, 6e4, 3e5),
        .poisson_ratio = digits(random, 0.2, 0.4),
        .yield_strength_mpa = digits(random, 100, 400),
        .ultimate_strength_mpa = digits(random, 400, 2000),
        .reduction_of_area = digits(random, 0.01, 0.9),
        .hardness_hb = digits(random, 100, 600),
        .fracture_stress_mpa = digits(random, 2000, 3000),
        .fracture_strain = digits(random, 0.01, 2.0),
        .strength_coefficient_mpa = digits(random, 300, 4000),
        .hardening_exponent = digits(random, 0.05, 0.3),
        .fatigue_strength_coefficient_mpa = digits(random, 300, 4000),
        .fatigue_strength_exponent = -digits(random, 0.04, 0.15),
        .fatigue_ductility_coefficient = digits(random, 1e-5, 3.0),
        .fatigue_ductility_exponent = -digits(random, 0.3, 0.9),
        .endurance_strain_amplitude = digits(random, 1e-4, 5e-3),
        .endurance_cycles = digits(random, 1e5, 1e10),
        .log10_life_sd = digits(random, 0.01, 1.0),
        .scatter_tests = test_random_int(random, 1, 2000000),
        .valid_cycles = {digits(random, 1, 100), digits(random, 1e4, 1e9)},
        .valid_strain_amplitude = {digits(random, 1e-6, 1e-3), digits(random, 1e-2, 5e-2)},
    };
    strcpy(m.name, "made");
    strcpy(m.source, "made for this test");
    return m;
}

static void numbers_come_back(void **state)
{
    (void)state;
    test_random random = {20250101};
    for (int i = 0; i < 60; i++) {
        nw_material written = random_material(&random);
        nw_material read = read_back(&written);
        assert_same(&written, &read);
    }
}

static void unknown_stays_unknown(void **state)
{
    (void)state;
    test_random random = {7};
    nw_material m = random_material(&random);
    m.yield_strength_mpa = m.reduction_of_area = m.hardness_hb = m.fracture_stress_mpa = NAN;
    m.ultimate_strength_mpa = m.fracture_strain = m.endurance_strain_amplitude = NAN;
    m.endurance_cycles = m.log10_life_sd = m.scatter_tests = NAN;
    m.valid_cycles[0] = m.valid_cycles[1] = NAN;
    m.valid_strain_amplitude[0] = m.valid_strain_amplitude[1] = NAN;
    nw_material read = read_back(&m);
    assert_same(&m, &read);
}

/* Text that YAML would take for something else, or not take at all. */
static void texts_come_back(void **state)
{
    (void)state;
    static const char *const texts[] = {
        "plain",
        "with \"quotes\" and 'others'",
        "colon: value # no comment",
        "back\\slash, {braces}, [brackets], - dash",
        "  blanks around  ",
        "true",
        "0.5",
        "R\xC3\xB6ssle, \xC2\xB5m, \xE2\x80\x93 dash, \xF0\x9F\x94\xA9",
        "NEL \xC2\x85 and line separator \xE2\x80\xA8 and mark \xEF\xBB\xBF inside",
        "%directive & *alias !tag | > @ `",
    };
    test_random random = {11};
    for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
        nw_material m = random_material(&random);
        snprintf(m.name, sizeof m.name, "%s", texts[i]);
        snprintf(m.source, sizeof m.source, "%s", texts[i]);
        snprintf(m.note, sizeof m.note, "%s", texts[i]);
        nw_material read = read_back(&m);
        assert_same(&m, &read);
    }
}

/* Control characters and those that turn text round are not let in: a page could be made to lie with them. */
static void controls_become_harmless(void **state)
{
    (void)state;
    test_random random = {12};
    nw_material m = random_material(&random);
    strcpy(m.name, "two\nlines\tand a tab");
    strcpy(m.source, "\x01 control \x7f\033[31m");
    strcpy(m.note, "turned \xE2\x80\xAE round");
    nw_material read = read_back(&m);
    assert_string_equal(read.name, "two lines and a tab");
    assert_string_equal(read.source, "  control   [31m");
    assert_string_equal(read.note, "turned ??? round");
}

/* A text cut inside a character (as a bounded copy does) loses that character only. */
static void cut_text_is_mended(void **state)
{
    (void)state;
    test_random random = {13};
    nw_material m = random_material(&random);
    strcpy(m.note, "R\xC3\xB6ssle \xE2\x80");
    nw_material read = read_back(&m);
    assert_string_equal(read.note, "R\xC3\xB6ssle ??");
}

/* The whole library, read, written, read. */
static void library_comes_back(void **state)
{
    (void)state;
    nw_library library;
    assert_int_equal(nw_library_list(&library, NULL), NW_OK);
    assert_true(library.count >= 30);
    for (size_t i = 0; i < library.count; i++) {
        nw_material material;
        assert_int_equal(nw_material_read(library.paths[i], &material, NULL), NW_OK);
        nw_material read = read_back(&material);
        assert_same(&material, &read);
    }
    nw_library_clear(&library);
}

static void stream_errors_are_told(void **state)
{
    (void)state;
    test_random random = {17};
    nw_material m = random_material(&random);
    FILE *full = fopen("/dev/full", "wb");
    if (full == NULL) {
        skip();
    }
    setvbuf(full, NULL, _IONBF, 0);
    assert_int_equal(nw_material_write(full, &m), NW_FILE);
    fclose(full);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(numbers_come_back),      cmocka_unit_test(unknown_stays_unknown),
        cmocka_unit_test(texts_come_back),        cmocka_unit_test(controls_become_harmless),
        cmocka_unit_test(cut_text_is_mended),     cmocka_unit_test(library_comes_back),
        cmocka_unit_test(stream_errors_are_told),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
