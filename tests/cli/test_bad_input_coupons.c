/* Wrong tables of coupon tests: what is said, and where. '@' marks the place that must be named; it is taken out
 * before the file is written. */
#include "support/support.h"

typedef struct bad_table {
    const char *name, *text, *options, *message;
    int status; /* 0: refused as input, 3 */
} bad_table;

static const char modulus[] = "--modulus '206 GPa'";

static const bad_table rows[] = {
    {"no unit of stress", "strain_amplitude,@stress_amplitude,cycles\n0.01,500,100\n", modulus,
     "stress_amplitude: found no unit, expected it in the header, as in stress_amplitude[MPa]", 0},
    {"strain in a unit of stress", "@strain_amplitude[MPa],cycles\n0.01,100\n", modulus,
     "strain_amplitude: found the unit 'MPa', expected a strain in ratio, %", 0},
    {"percent without saying so",
     "strain_amplitude,stress_amplitude[MPa],cycles\n@1.5,580,300\n0.5,470,4000\n", modulus,
     "strain_amplitude: found 1.5 (a strain of 1.5), expected a ratio below 0.2; is the unit "
     "missing in the header",
     0},
    {"strain and stress swapped", "strain_amplitude,stress_amplitude[MPa],cycles\n@580,0.015,300\n",
     modulus,
     "strain_amplitude: found 580 (a strain of 580), expected a ratio below 0.2; are "
     "strain and stress swapped?",
     0},
    {"stress as strain", "strain_amplitude,stress_amplitude[MPa],cycles\n0.015,@0.014,300\n",
     modulus,
     "stress_amplitude: found 0.014 MPa, expected 1 to 5000 MPa; are strain and stress "
     "swapped",
     0},
    {"ksi read as MPa is too much strain",
     "strain_amplitude,stress_amplitude[ksi],cycles\n0.01,@580,300\n", modulus,
     "stress_amplitude: found 3998.96 MPa, which is an elastic strain of 0.0194124", 0},
    {"zero life", "strain_amplitude,stress_amplitude[MPa],cycles\n0.015,580,@0\n", modulus,
     "cycles: found 0, expected a life above 0", 0},
    {"negative life", "strain_amplitude,stress_amplitude[MPa],reversals\n0.015,580,@-40\n", modulus,
     "reversals: found -40, expected a life above 0", 0},
    {"negative strain", "strain_amplitude,cycles\n@-0.015,580\n", modulus,
     "strain_amplitude: found -0.015, expected a strain amplitude above 0", 0},
    {"plastic above total",
     "strain_amplitude,plastic_strain_amplitude,cycles\n0.01,0.007,1000\n0.015,@0.016,300\n",
     modulus,
     "plastic_strain_amplitude: found a plastic strain of 0.016 above the total strain of "
     "0.015",
     0},
    {"an id twice", "id,strain_amplitude,cycles\nA1,0.015,300\nB1,0.01,900\n@A1,0.005,4000\n",
     modulus, "id: found 'A1' again (first in line 2), expected each id once", 0},
    {"an id twice in the last column", "strain_amplitude,cycles,id\n0.015,300,A1\n0.01,900,@A1\n",
     modulus, "id: found 'A1' again (first in line 2)", 0},
    {"an empty id", "id,strain_amplitude,cycles\n@,0.015,300\n", modulus,
     "id: found an empty field", 0},
    {"no number", "strain_amplitude,cycles\n0.015,@many\n", modulus,
     "cycles: found 'many', expected a finite number", 0},
    {"nan", "strain_amplitude,cycles\n0.015,@nan\n", modulus,
     "cycles: found 'nan', expected a finite number", 0},
    {"infinity", "strain_amplitude,cycles\n0.015,@1e999\n", modulus,
     "cycles: found '1e999', expected a finite number", 0},
    {"an empty field", "strain_amplitude,cycles\n0.015,@\n", modulus,
     "cycles: found an empty field, expected a finite number", 0},
    {"decimal commas", "strain_amplitude;cycles\n@0,015;300\n", modulus,
     "strain_amplitude: found '0,015', expected a finite number (decimal commas need --decimal ,)",
     0},
    {"run-out flag", "strain_amplitude,cycles,runout\n0.015,300,@yes\n", modulus,
     "runout: found 'yes', expected 0 (failed) or 1 (stopped without failure)", 0},
    {"a short row", "strain_amplitude,cycles\n@0.015\n", modulus,
     "found 1 field in this row, expected 2 as in the header", 0},
    {"no header", "@0.015,300\n0.01,900\n", modulus, "found numbers, expected a header", 0},
    {"no life", "@strain_amplitude,stress_amplitude[MPa]\n0.01,500\n", modulus,
     "found no life, expected a column 'cycles' or 'reversals'", 0},
    {"two lives", "@strain_amplitude,cycles,reversals\n0.01,500,1000\n", modulus,
     "found both cycles and reversals, expected one of them", 0},
    {"no amplitude", "@id,cycles\nA,500\n", modulus, "found no amplitude, expected", 0},
    {"a column twice", "strain_amplitude,@strain_amplitude,cycles\n0.01,0.01,500\n", modulus,
     "strain_amplitude: found this column twice", 0},
    {"a slip of the pen", "strain_amplitude,cycles,@run_out\n0.01,500,1\n", modulus,
     "unknown column 'run_out'; did you mean 'runout'", 0},
    {"a flag of another name", "strain_amplitude,cycles,@status\n0.01,500,1\n", modulus,
     "unknown column 'status'; did you mean 'runout' (0 failed, 1 stopped without failure)?", 0},
    {"a unit of life", "strain_amplitude,@cycles[k]\n0.01,500\n", modulus,
     "cycles: found the unit 'k', expected none", 0},
    {"nothing", "", modulus, "found no tests, expected a header and a row each", 0},
    {"no rows", "strain_amplitude,cycles\n", modulus, "found no tests, expected a row for each", 0},
    {"one level only",
     "strain_amplitude,stress_amplitude[MPa],cycles\n0.01,540,800\n0.01,541,900\n0.0101,542,850\n",
     modulus, "found one level of amplitude in 3 tests (within 2 %), expected at least two", 0},
    {"all run-outs",
     "strain_amplitude,stress_amplitude[MPa],cycles,runout\n0.002,400,1e6,1\n0.001,200,1e6,1\n",
     modulus, "found 2 run-outs and no failure, expected failures", 0},
    {"no modulus", "strain_amplitude,stress_amplitude[MPa],cycles\n0.01,540,800\n0.005,470,4000\n",
     "", "plastic strain was not measured in all tests, so Young's modulus is needed", 0},
    {"a test that is not there",
     "id,strain_amplitude,stress_amplitude[MPa],cycles\nA,0.01,540,800\nB,0.005,470,4000\n",
     "--modulus '206 GPa' --drop C", "no test is called 'C', which was to be dropped", 0},
    {"modulus without unit", "strain_amplitude,cycles\n0.01,800\n", "--modulus 206000",
     "--modulus: found '206000' without a unit", 2},
    {"modulus in MPa by mistake", "strain_amplitude,cycles\n0.01,800\n", "--modulus '206 MPa'",
     "--modulus: found 206 MPa, expected 1000 to 1e+06 MPa", 2},
    {"a share above one", "strain_amplitude,cycles\n0.01,800\n", "--survival 90",
     "--survival: found '90', expected a share between 0 and 100 %", 2},
    {"an unknown method", "strain_amplitude,cycles\n0.01,800\n", "--method bayes",
     "--method: found 'bayes', expected lines or likelihood", 2},
    {"a plan for no tests", "strain_amplitude,cycles\n0.01,800\n", "--plan 1e5 --plan-tests 0",
     "--plan-tests: found '0', expected a whole number from 1 to 60", 2},
    {"likelihood of too few",
     "strain_amplitude,stress_amplitude[MPa],cycles\n0.01,540,800\n0.005,470,4000\n0.003,410,9e3\n",
     "--modulus '206 GPa' --method likelihood", "likelihood: needs at least 6 failures", 4},
};

static void refuse(void **state)
{
    const bad_table *row = *state;
    test_scratch scratch = test_scratch_create();
    char text[2000], expected[700] = "";
    size_t used = 0, line = 1, column = 1;
    for (const char *at = row->text; *at != '\0'; at++) {
        if (*at == '@') {
            snprintf(expected, sizeof expected, "tests.csv:%zu:%zu: error: ", line, column);
            continue;
        }
        text[used++] = *at;
        column = *at == '\n' ? 1 : column + 1;
        line += *at == '\n';
    }
    test_scratch_write(&scratch, "tests.csv", text, used);
    test_result result =
        test_shell("cd '%s' && timeout 60 \"$NW\" fit tests.csv %s", scratch.path, row->options);
    int status = row->status == 0 ? 3 : row->status;
    strcat(expected, row->message);
    if (result.status != status || strstr(result.err, expected) == NULL) {
        fail_msg("%s: expected status %d and '%s', found %d and\n%s", row->name, status, expected,
                 result.status, result.err);
    }
    assert_string_equal(result.out, "");
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

/* Many faults come together; a million of them do not take long or much room. */
static void a_million_rows(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    size_t room = 40u * 1000000u, used;
    char *text = malloc(room);
    assert_non_null(text);
    used = (size_t)sprintf(text, "strain_amplitude[%%],stress_amplitude[MPa],cycles\n");
    for (size_t i = 0; i < 1000000; i++) {
        double cycles = 100.0 + 7.0 * (double)(i % 1000), reversals = 2.0 * cycles;
        double stress = 1000.0 * pow(reversals, -0.09);
        double strain = stress / 206000.0 + 0.5 * pow(reversals, -0.6);
        /* 1 % of scatter, the same in both directions */
        used += (size_t)sprintf(text + used, "%.6f,%.3f,%.2f\n", 100.0 * strain, stress,
                                cycles * (i / 1000 % 2 == 0 ? 1.01 : 1.0 / 1.01));
    }
    test_scratch_write(&scratch, "tests.csv", text, used);
    test_result result = test_shell("cd '%s' && timeout 300 \"$NW\" fit tests.csv --modulus '206 "
                                    "GPa' --method lines --format json | grep -A1 "
                                    "'\"fatigue_strength_exponent\": {'",
                                    scratch.path);
    assert_int_equal(result.status, 0);
    const char *value = strstr(result.out, "\"value\": ");
    assert_non_null(value);
    assert_near(strtod(value + 9, NULL), -0.09, 1e-3, 0.0);
    test_result_free(&result);
    used = (size_t)sprintf(text, "id,strain_amplitude,cycles\n");
    for (size_t i = 0; i < 1000000; i++) {
        used += (size_t)sprintf(text + used, "A,%d,0\n", (int)(i % 2));
    }
    test_scratch_write(&scratch, "tests.csv", text, used);
    result = test_shell("cd '%s' && timeout 300 \"$NW\" fit tests.csv", scratch.path);
    assert_int_equal(result.status, 3);
    assert_non_null(strstr(result.err, "tests.csv:2:3: error: strain_amplitude: found 0"));
    assert_non_null(strstr(result.err, "error: and "));
    test_result_free(&result);
    free(text);
    test_scratch_remove(&scratch);
}

/* What is odd but can be used is used, with a caution. */
static void cautions(void **state)
{
    (void)state;
    static const struct {
        const char *text, *options, *code;
    } odd[] = {
        {"strain_amplitude,stress_amplitude[MPa],cycles,operator\n0.015,580,300,ab\n0.01,545,800,"
         "ab\n0.005,470,4000,cd\n",
         "--modulus '206 GPa'", "columns_not_read"},
        {"strain_amplitude,stress_amplitude[MPa],cycles\n0.15,310,150000\n0.18,335,90000\n",
         "--modulus '206 GPa'", "units_suspect"},
        {"strain_amplitude,stress_amplitude[MPa],plastic_strain_amplitude,cycles\n0.015,580,0.0122,"
         "300\n0.01,545,0.00735,800\n0.005,470,0.0027,4000\n",
         "", "modulus_from_tests"},
        {"strain_amplitude,stress_amplitude[MPa],plastic_strain_amplitude,cycles\n0.015,580,0.0122,"
         "300\n0.01,545,0.00735,800\n0.005,470,0.0027,4000\n",
         "--modulus '170 GPa'", "modulus_disagrees"},
        {"plastic_strain_amplitude,cycles\n0.01,500\n0.001,10000\n", "", "small_sample"},
        {"stress_amplitude[MPa],cycles\n948,222\n834,992\n703,6004\n631,14130\n", "",
         "line_not_fitted"},
        {"plastic_strain_amplitude,cycles\n0.01,500\n0.001,600\n", "", "outside_usual_range"},
        {"plastic_strain_amplitude,cycles\n0.01,0.0005\n0.001,0.01\n", "",
         "life_below_one_reversal"},
    };
    for (size_t i = 0; i < sizeof odd / sizeof odd[0]; i++) {
        test_scratch scratch = test_scratch_create();
        const char *path = test_scratch_text(&scratch, "tests.csv", odd[i].text);
        test_result result = test_shell("\"$NW\" fit '%s' %s --format json", path, odd[i].options);
        if (result.status != 0 || strstr(result.out, odd[i].code) == NULL) {
            fail_msg("%s: status %d\n%s", odd[i].code, result.status, result.err);
        }
        test_result_free(&result);
        test_scratch_remove(&scratch);
    }
}

/* Lives that rise with amplitude fit a curve that no assessment can use: no file is written. */
static void rising_lives_are_not_saved(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    const char *path = test_scratch_text(&scratch, "tests.csv",
                                         "strain_amplitude[%],stress_amplitude[MPa],cycles\n"
                                         "1,500,10000\n0.5,400,1000\n0.3,300,100\n0.25,290,50\n");
    test_result result =
        test_shell("\"$NW\" fit '%s' --modulus '206 GPa' --save '%s/m.yaml'", path, scratch.path);
    assert_int_equal(result.status, 4);
    assert_non_null(strstr(result.err, "the fitted curve cannot be used"));
    test_result_free(&result);
    test_result listing = test_shell("ls '%s'", scratch.path);
    assert_string_equal(listing.out, "tests.csv\n");
    test_result_free(&listing);
    test_scratch_remove(&scratch);
}

int main(void)
{
    enum { ROWS = sizeof rows / sizeof rows[0] };
    struct CMUnitTest tests[ROWS + 3];
    for (size_t i = 0; i < ROWS; i++) {
        tests[i] =
            (struct CMUnitTest){rows[i].name, refuse, NULL, NULL, (void *)(uintptr_t)&rows[i]};
    }
    tests[ROWS] = (struct CMUnitTest)cmocka_unit_test(a_million_rows);
    tests[ROWS + 1] = (struct CMUnitTest)cmocka_unit_test(cautions);
    tests[ROWS + 2] = (struct CMUnitTest)cmocka_unit_test(rising_lives_are_not_saved);
    return cmocka_run_group_tests(tests, NULL, NULL);
}
