/* What `estimate` and `material` refuse, and how they say so. */
#include "support/support.h"

typedef struct refused {
    const char *name;
    const char *arguments; /* as typed after the program */
    int status;
    const char *message, *message_2;
} refused;

#define GOOD "estimate --ultimate '820 MPa' --modulus '206 GPa' --group steel "

static const refused rows[] = {
    /* units */
    {"bare_strength", "estimate --ultimate 820 --modulus '206 GPa'", 2,
     "--ultimate: found '820' without a unit, expected a stress", "try: notchwright estimate"},
    {"strength_in_mm", "estimate --ultimate '820 mm' --modulus '206 GPa'", 2,
     "--ultimate: found '820 mm' (a length), expected a stress", NULL},
    {"strength_no_number", "estimate --ultimate strong --modulus '206 GPa'", 2,
     "--ultimate: found 'strong', expected a number with a unit of stress", NULL},
    {"strength_nan", "estimate --ultimate 'nan MPa' --modulus '206 GPa'", 2,
     "--ultimate: found 'nan MPa'", NULL},
    {"modulus_in_percent", "estimate --ultimate '820 MPa' --modulus '206 %'", 2,
     "--modulus: found '206 %'", NULL},
    {"hardness_in_mpa", GOOD "--hardness '245 MPa'", 2,
     "--hardness: found '245 MPa' (a stress), expected a hardness in HB", NULL},
    {"hardness_bare", GOOD "--hardness 245", 2, "--hardness: found '245' without a unit", NULL},
    {"hardness_vickers", GOOD "--hardness '245 HV'", 2, "--hardness: found '245 HV'",
     "Vickers and Rockwell are not converted: that takes the table for the alloy in ISO 18265 or "
     "ASTM E140"},
    {"hardness_vickers_load", GOOD "--hardness '245 HV10'", 2, "Vickers and Rockwell", NULL},
    {"hardness_rockwell", GOOD "--hardness '45 HRC'", 2, "Vickers and Rockwell", NULL},
    {"fracture_stress_as_strain", GOOD "--fracture-stress '80 %'", 2,
     "--fracture-stress: found '80 %'", NULL},
    {"fracture_strain_bare", GOOD "--fracture-strain 0.8", 2,
     "--fracture-strain: found '0.8' without a unit, expected a strain", NULL},
    {"amplitude_bare", GOOD "--at 0.005", 2, "--at: found '0.005' without a unit", NULL},
    {"amplitude_empty", GOOD "--at ''", 2, "--at: found ''", NULL},
    {"amplitude_trailing_comma", GOOD "--at '0.5 %,'", 2, "--at: found ''", NULL},
    {"amplitude_of_stress", GOOD "--at '0.5 %,300 MPa'", 2, "--at: found '300 MPa'", NULL},
    {"two_bad_options", "estimate --ultimate 820 --modulus 206", 2, "--ultimate: found '820'",
     "--modulus: found '206'"},
    /* values that cannot be */
    {"strength_negative", "estimate --ultimate '-820 MPa' --modulus '206 GPa'", 3,
     "ultimate_strength: found -820 MPa, expected a value above 0 MPa", NULL},
    {"strength_zero", "estimate --ultimate '0 MPa' --modulus '206 GPa'", 3,
     "ultimate_strength: found 0 MPa, expected a value above 0 MPa", NULL},
    {"strength_ksi_as_gpa", "estimate --ultimate '119 GPa' --modulus '206 GPa'", 3,
     "ultimate_strength: found 119000 MPa, expected", "at most 10000 MPa"},
    {"strength_near_modulus", "estimate --ultimate '8200 MPa' --modulus '80 GPa' --group other", 3,
     "ultimate_strength: found 8200 MPa, expected below a tenth of Young's modulus", NULL},
    {"modulus_in_mpa_for_gpa", "estimate --ultimate '820 MPa' --modulus '206 MPa' --group steel", 3,
     "youngs_modulus: found 206 MPa, expected a value at least 1000 MPa", NULL},
    {"area_100_percent", GOOD "--reduction-of-area '100 %'", 3,
     "reduction_of_area: found 1, expected a value above 0 and below 1", NULL},
    {"area_as_55", GOOD "--reduction-of-area 55", 3, "reduction_of_area: found 55, expected", NULL},
    {"area_negative", GOOD "--reduction-of-area '-5 %'", 3, "reduction_of_area: found -0.05", NULL},
    {"area_zero", GOOD "--reduction-of-area 0", 3, "reduction_of_area: found 0, expected", NULL},
    {"hardness_zero", GOOD "--hardness '0 HB'", 3, "hardness: found 0 HB, expected", NULL},
    {"hardness_huge", GOOD "--hardness '2400 HB'", 3, "hardness: found 2400 HB, expected", NULL},
    {"fracture_strain_huge", GOOD "--fracture-strain '80 ratio'", 3,
     "fracture_strain: found 80, expected", NULL},
    {"fracture_stress_below_strength", GOOD "--fracture-stress '500 MPa'", 3,
     "fracture_stress: found 500 MPa, expected the true stress at fracture", NULL},
    {"yield_above_strength", GOOD "--yield '900 MPa'", 3,
     "yield_strength: found 900 MPa, expected at most the ultimate strength (820 MPa)", NULL},
    {"amplitude_zero", GOOD "--at '0 %'", 3, "strain_amplitudes: found 0, expected", NULL},
    {"amplitude_negative", GOOD "--at '-0.2 %'", 3, "strain_amplitudes: found -0.002", NULL},
    {"amplitude_50_percent", GOOD "--at '50 %'", 3, "strain_amplitudes: found 0.5, expected", NULL},
    {"two_bad_values", GOOD "--reduction-of-area '120 %' --hardness '-3 HB'", 3,
     "reduction_of_area: found 1.2", "hardness: found -3 HB"},
    /* what is missing or unknown */
    {"nothing_given", "estimate", 2, "--modulus is missing", "--ultimate is missing"},
    {"no_modulus", "estimate --ultimate '820 MPa'", 2, "--modulus is missing", NULL},
    {"no_strength", "estimate --modulus '206 GPa'", 2, "--ultimate is missing", NULL},
    {"group_not_given_for_light_metal", "estimate --ultimate '470 MPa' --modulus '70 GPa'", 2,
     "--group is missing; steel would be assumed, but a modulus of 70 GPa is not that of a steel",
     NULL},
    {"unknown_group", GOOD "--group stel", 2, "--group: found 'stel', expected steel, cast_steel",
     NULL},
    {"unknown_method", GOOD "--method universal", 2,
     "--method: found 'universal', expected uniform_material_law, hardness", NULL},
    {"method_that_does_not_apply", GOOD "--method universal_slopes", 3,
     "--method: universal_slopes does not apply: reduction_of_area (or fracture_strain) is missing",
     NULL},
    {"save_without_a_method",
     "estimate --ultimate '400 MPa' --modulus '150 GPa' --group cast_iron --save out.yaml", 3,
     "--save: no method applies", NULL},
    {"save_one_that_does_not_apply", GOOD "--method hardness --save out.yaml", 3,
     "--method: hardness does not apply: hardness is missing", NULL},
    {"save_into_missing_folder", GOOD "--save nowhere/out.yaml", 5,
     "nowhere/out.yaml: error: cannot be written", NULL},
    {"name_empty", GOOD "--save out.yaml --name ''", 2, "--name: found 0 bytes", NULL},
    {"name_long", GOOD "--save out.yaml --name $(printf %0100d 7)", 2, "--name: found 100 bytes",
     NULL},
    {"operand", "estimate steel --ultimate '820 MPa'", 2, "found 1 argument, expected none", NULL},
    {"many_amplitudes", GOOD "--at '1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%,1%'", 2,
     "--at: found more than 16 strain amplitudes", NULL},
    /* material */
    {"material_alone", "material", 2, "found 0 arguments, expected list|show|check", NULL},
    {"material_unknown", "material lst", 2, "material: found 'lst', expected list, show or check",
     NULL},
    {"list_with_name", "material list rqc-100", 2,
     "material list: found 1 names, expected no names", NULL},
    {"list_unknown_group", "material list --group iron", 2, "--group: found 'iron', expected steel",
     NULL},
    {"list_bare_strength", "material list --min-strength 600", 2,
     "--min-strength: found '600' without a unit", NULL},
    {"list_limits_crossed", "material list --min-strength '2 GPa' --max-strength '1 GPa'", 2,
     "--min-strength: found 2000 MPa, expected at most --max-strength (1000 MPa)", NULL},
    {"show_nothing", "material show", 2,
     "material show: found 0 names, expected one library name or file", NULL},
    {"show_two", "material show rqc-100 man-ten-hot-rolled", 2, "found 2 names, expected one",
     NULL},
    {"show_unknown", "material show rqc-101", 3,
     "no library material 'rqc-101' (did you mean "
     "'rqc-100'?)",
     NULL},
    {"show_missing_file", "material show ./rqc-100.yaml", 5, "cannot be opened", NULL},
    {"show_climbing_name", "material show ..", 3, "no library material '..'", NULL},
    {"show_cycles_zero", "material show rqc-100 --cycles 0", 3, "--cycles: found 0, expected",
     NULL},
    {"show_cycles_word", "material show rqc-100 --cycles many", 2, "--cycles: found 'many'", NULL},
    {"show_cycles_unit", "material show rqc-100 --cycles '1e6 mm'", 2, "--cycles: found '1e6 mm'",
     NULL},
    {"check_nothing", "material check", 2,
     "material check: found 0 names, expected files or library names", NULL},
    {"check_folder", "material check ./", 5, "error: cannot be read: Is a directory", NULL},
};
enum { ROWS = sizeof rows / sizeof rows[0] };

static void refuse(void **state)
{
    const refused *row = *state;
    test_scratch scratch = test_scratch_create();
    test_result result =
        test_shell("cd '%s' && timeout 60 \"$NW\" %s", scratch.path, row->arguments);
    if (result.status != row->status) {
        fail_msg("%s: exit status %d, expected %d\n%s", row->name, result.status, row->status,
                 result.err);
    }
    if (strstr(result.err, row->message) == NULL ||
        (row->message_2 != NULL && strstr(result.err, row->message_2) == NULL)) {
        fail_msg("%s: expected '%s' and '%s', found\n%s", row->name, row->message,
                 row->message_2 == NULL ? "" : row->message_2, result.err);
    }
    if (strncmp(row->name, "check_folder", 12) != 0) { /* a check reports on every file */
        assert_string_equal(result.out, "");
    }
    test_result_free(&result);
    test_result listing = test_shell("ls -A '%s'", scratch.path);
    assert_string_equal(listing.out, ""); /* nothing half written */
    test_result_free(&listing);
    test_scratch_remove(&scratch);
}

int main(void)
{
    struct CMUnitTest tests[ROWS];
    for (size_t i = 0; i < ROWS; i++) {
        tests[i] =
            (struct CMUnitTest){rows[i].name, refuse, NULL, NULL, (void *)(uintptr_t)&rows[i]};
    }
    return cmocka_run_group_tests(tests, NULL, NULL);
}
