/* Quantities: numbers with units, and what is refused. Conversion factors are exact by definition: the inch
 * is 25.4 mm (international yard and pound agreement, 1959) and the pound-force 4.4482216152605 N. */
#include "notchwright/quantity.h"
#include "support/support.h"

static double read_good(const char *text, nw_dimension dimension, const nw_default_units *defaults)
{
    double value = NAN;
    char why[300] = "";
    if (nw_quantity_read(text, dimension, defaults, &value, why, sizeof why) != NW_OK) {
        fail_msg("'%s' was refused: %s", text, why);
    }
    return value;
}

/* Refused, the value untouched, and the reason holds each of the words. */
static void refused(const char *text, nw_dimension dimension, const nw_default_units *defaults,
                    const char *word, const char *other)
{
    double value = -77.0;
    char why[300] = "";
    assert_int_equal(nw_quantity_read(text, dimension, defaults, &value, why, sizeof why),
                     NW_INPUT);
    assert_near(value, -77.0, 0.0, 0.0);
    if (strstr(why, word) == NULL || strstr(why, other) == NULL) {
        fail_msg("'%s' gives '%s', which lacks '%s' or '%s'", text, why, word, other);
    }
}

static void every_unit(void **state)
{
    static const struct {
        const char *text;
        nw_dimension dimension;
        double value;
    } rows[] = {
        {"820 MPa", NW_STRESS, 820.0},
        {"206 GPa", NW_STRESS, 206000.0},
        {"820 N/mm2", NW_STRESS, 820.0},
        {"820 N/mm^2", NW_STRESS, 820.0},
        {"5e6 Pa", NW_STRESS, 5.0},
        {"5000 kPa", NW_STRESS, 5.0},
        {"50 bar", NW_STRESS, 5.0},
        {"1 psi", NW_STRESS, 0.00689475729316836},
        {"119 ksi", NW_STRESS, 820.476117887034},
        {"30 Msi", NW_STRESS, 206842.718795051},
        {"2.5 mm", NW_LENGTH, 2.5},
        {"0.1 in", NW_LENGTH, 2.54},
        {"25 um", NW_LENGTH, 0.025},
        {"25 \xC2\xB5m", NW_LENGTH, 0.025},
        {"2 cm", NW_LENGTH, 20.0},
        {"0.02 m", NW_LENGTH, 20.0},
        {"1500 microstrain", NW_STRAIN, 0.0015},
        {"0.35 %", NW_STRAIN, 0.0035},
        {"0.35 percent", NW_STRAIN, 0.0035},
        {"0.0035 mm/mm", NW_STRAIN, 0.0035},
        {"0.0035 in/in", NW_STRAIN, 0.0035},
        {"0.0035 ratio", NW_STRAIN, 0.0035},
        {"51 %", NW_FRACTION, 0.51},
        {"0.51", NW_FRACTION, 0.51},
        {"180 HB", NW_HARDNESS, 180.0},
        {"-0.087", NW_PURE, -0.087},
        {"2e6", NW_PURE, 2e6},
        {"+3", NW_PURE, 3.0},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        assert_near(read_good(rows[i].text, rows[i].dimension, NULL), rows[i].value, 1e-14, 0.0);
    }
}

static void blanks_do_not_matter(void **state)
{
    assert_near(read_good("820MPa", NW_STRESS, NULL), 820.0, 0.0, 0.0);
    assert_near(read_good("  820   MPa", NW_STRESS, NULL), 820.0, 0.0, 0.0);
    assert_near(read_good("\t0.35%", NW_STRAIN, NULL), 0.0035, 1e-15, 0.0);
}

static void bare_numbers_need_a_default(void **state)
{
    nw_default_units units = {{NULL}};
    refused("820", NW_STRESS, NULL, "without a unit", "MPa");
    refused("820", NW_STRESS, &units, "without a unit", "MPa");
    refused("2.5", NW_LENGTH, &units, "without a unit", "mm");
    units.unit[NW_STRESS] = "ksi";
    assert_near(read_good("119", NW_STRESS, &units), 820.476117887034, 1e-14, 0.0);
    assert_near(read_good("820 MPa", NW_STRESS, &units), 820.0, 0.0, 0.0);
    refused("2.5", NW_LENGTH, &units, "without a unit", "mm");
}

static void wrong_dimension(void **state)
{
    refused("820 MPa", NW_LENGTH, NULL, "stress", "mm");
    refused("2.5 mm", NW_STRESS, NULL, "length", "MPa");
    refused("2.35 mm", NW_PURE, NULL, "length", "no unit");
    refused("5 %", NW_STRESS, NULL, "strain", "MPa");
}

static void unknown_unit(void **state)
{
    refused("820 mpa", NW_STRESS, NULL, "unknown unit", "MPa");
    refused("820 furlong", NW_LENGTH, NULL, "unknown unit", "mm");
    refused("820 MPa MPa", NW_STRESS, NULL, "unknown unit", "MPa");
}

static void not_a_number(void **state)
{
    static const char *const texts[] = {"",    "MPa", "abc MPa", "nan MPa", "inf MPa", "-inf MPa",
                                        "--5", "e5",  ".",       "-",       "+ 5 MPa"};
    for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
        refused(texts[i], NW_STRESS, NULL, "found", "expected");
    }
    refused("1e400 MPa", NW_STRESS, NULL, "finite", "found");
    refused("1e308 GPa", NW_STRESS, NULL, "finite", "found");
    refused("0x10 MPa", NW_STRESS, NULL, "found", "expected");
    refused("1,5 MPa", NW_STRESS, NULL, "found", "expected");
}

/* The reason fits whatever room there is. */
static void reason_is_cut_to_its_room(void **state)
{
    char long_text[600], why[40];
    double value;
    memset(long_text, 'x', sizeof long_text - 1);
    long_text[sizeof long_text - 1] = '\0';
    assert_int_equal(nw_quantity_read(long_text, NW_STRESS, NULL, &value, why, sizeof why),
                     NW_INPUT);
    assert_true(strlen(why) < sizeof why);
    long_text[0] = '5';
    assert_int_equal(nw_quantity_read(long_text, NW_STRESS, NULL, &value, why, sizeof why),
                     NW_INPUT);
    assert_true(strlen(why) < sizeof why);
}

static void plain_numbers(void **state)
{
    double value = 0.0;
    assert_true(nw_number_read("-1.25e2", &value));
    assert_near(value, -125.0, 0.0, 0.0);
    assert_false(nw_number_read("1.25 ", &value));
    assert_false(nw_number_read(" 1.25", &value));
    assert_false(nw_number_read("1.25x", &value));
    assert_false(nw_number_read("", &value));
    assert_false(nw_number_read("inf", &value));
    assert_false(nw_number_read("1e999", &value));
    assert_near(value, -125.0, 0.0, 0.0);
}

/* Every unit that a dimension lists is one. */
static void listed_units_are_known(void **state)
{
    for (int d = NW_STRESS; d < NW_DIMENSIONS; d++) {
        char list[200];
        snprintf(list, sizeof list, "%s", nw_dimension_units((nw_dimension)d));
        char *end = strchr(list, '(');
        if (end != NULL) {
            *end = '\0';
        }
        for (char *word = strtok(list, ", "); word != NULL; word = strtok(NULL, ", ")) {
            double factor;
            if (strcmp(word, "or") != 0) {
                assert_true(nw_unit_factor(word, (nw_dimension)d, &factor));
                assert_true(factor > 0.0);
            }
        }
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_unit),
        cmocka_unit_test(blanks_do_not_matter),
        cmocka_unit_test(wrong_dimension),
        cmocka_unit_test(bare_numbers_need_a_default),
        cmocka_unit_test(unknown_unit),
        cmocka_unit_test(not_a_number),
        cmocka_unit_test(plain_numbers),
        cmocka_unit_test(reason_is_cut_to_its_room),
        cmocka_unit_test(listed_units_are_known),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
