/* Numbers in text against strtod, which is correctly rounded, bit for bit. */
#include "base/number.h"
#include "support/support.h"

enum { TEXTS = 100000, LONGEST = 390 };

/* Texts with room for the padding that the fast reader may touch. */
typedef struct padded {
    char chars[LONGEST + 16 + NW_NUMBER_PADDING];
    size_t length;
} padded;

static void add_digits(padded *t, test_random *random, int count)
{
    for (int i = 0; i < count; i++) {
        t->chars[t->length++] = (char)('0' + test_random_int(random, 0, 9));
    }
}

/* Short and long numbers, with and without sign, point and exponent; something always follows. */
static padded random_number(test_random *random)
{
    static const int longest[] = {3, 7, 8, 9, 20, 150};
    static const char after[] = "\n\r,; \t#x";
    padded t = {.length = 0};
    int most = longest[test_random_int(random, 0, 5)];
    int sign = test_random_int(random, 0, 3);
    if (sign < 2) {
        t.chars[t.length++] = sign == 0 ? '-' : '+';
    }
    int whole = test_random_int(random, 0, most);
    add_digits(&t, random, whole);
    if (whole == 0 || test_random_int(random, 0, 2) > 0) {
        t.chars[t.length++] = '.';
        add_digits(&t, random, test_random_int(random, whole == 0 ? 1 : 0, most));
    }
    if (test_random_int(random, 0, 3) == 0) {
        t.length += (size_t)sprintf(t.chars + t.length, "%c%+d",
                                    test_random_int(random, 0, 1) == 0 ? 'e' : 'E',
                                    test_random_int(random, -340, 320));
    }
    t.chars[t.length] = after[test_random_int(random, 0, 7)];
    memset(t.chars + t.length + 1, '7', NW_NUMBER_PADDING);
    return t;
}

static void assert_bits(double found, double expected, const char *text)
{
    if (memcmp(&found, &expected, sizeof found) != 0) {
        fail_msg("'%.60s' is read as %.17g, expected %.17g", text, found, expected);
    }
}

static void assert_reads(const padded *t, char decimal, double expected)
{
    const char *start = t->chars, *end = start + t->length;
    double plain = NAN, fast = NAN;
    assert_ptr_equal(nw_number_scan(start, end, decimal, &plain), end);
    assert_ptr_equal(nw_number_scan_padded(start, end, decimal, &fast), end);
    assert_bits(plain, expected, start);
    assert_bits(fast, expected, start);
}

static void random_numbers_as_strtod(void **state)
{
    test_random random = {81};
    for (int i = 0; i < TEXTS; i++) {
        padded t = random_number(&random);
        char *end, saved = t.chars[t.length];
        t.chars[t.length] = '\0';
        double expected = strtod(t.chars, &end);
        assert_ptr_equal(end, t.chars + t.length);
        t.chars[t.length] = saved;
        assert_reads(&t, '.', expected);
        char *point = memchr(t.chars, '.', t.length);
        if (point != NULL) {
            *point = ',';
            if (saved != ',') {
                assert_reads(&t, ',', expected);
            }
        }
    }
}

/* Doubles printed to 17 digits come back as they were. */
static void doubles_come_back(void **state)
{
    test_random random = {82};
    for (int i = 0; i < TEXTS; i++) {
        uint64_t bits = test_random_bits(&random);
        double value;
        memcpy(&value, &bits, sizeof value);
        if (isfinite(value)) {
            padded t = {.length = 0};
            t.length = (size_t)sprintf(t.chars, "%.17g", value);
            t.chars[t.length] = '\n';
            assert_reads(&t, '.', value);
        }
    }
}

/* Halfway cases and other numbers that naive readers round wrongly. */
static void hard_numbers(void **state)
{
    static const char *const texts[] = {
        "9007199254740993",
        "9007199254740992.999999999999999",
        "1e23",
        "8.5e22",
        "123456789012345678901234567890",
        "0.1",
        "1.7976931348623157e308",
        "2.2250738585072011e-308",
        "5e-324",
        "2.4703282292062327e-324",
        "2.4703282292062328e-324",
        "9999999.9999999",
        "4503599627370496.5",
        "4503599627370497.5",
        "0000000000000000000001",
        "0.000000000000000000000001",
        "9999999",
        "99999999",
        "9999999.9999999",
        "0.0000001",
        "-0.0",
    };
    for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
        padded t = {.length = strlen(texts[i])};
        memcpy(t.chars, texts[i], t.length);
        t.chars[t.length] = '\n';
        assert_reads(&t, '.', strtod(texts[i], NULL));
    }
}

static void stops(const char *text, char decimal, size_t expected)
{
    padded t = {.length = strlen(text)};
    memcpy(t.chars, text, t.length);
    t.chars[t.length] = '\n';
    const char *end = t.chars + t.length;
    double value = 0.0;
    assert_ptr_equal(nw_number_scan(t.chars, end, decimal, &value), t.chars + expected);
    assert_ptr_equal(nw_number_scan_padded(t.chars, end, decimal, &value), t.chars + expected);
}

/* The place after the number: what cannot go on with it stays. */
static void reads_up_to_what_is_no_number(void **state)
{
    stops("12abc", '.', 2);
    stops("12e", '.', 2);
    stops("12e+", '.', 2);
    stops("12e+x", '.', 2);
    stops("1.5.5", '.', 3);
    stops("1,5", '.', 1);
    stops("1.5", ',', 1);
    stops("1-2", '.', 1);
    stops("5.", '.', 2);
    stops("5.e3", '.', 4);
}

static void no_number(void **state)
{
    static const char *const texts[] = {"",    "-",   "+",   ".",   "-.",  "e5", ".e5", "nan",
                                        "inf", "abc", "--5", "+-5", "-+5", " 5", "#",   "NaN"};
    for (size_t i = 0; i < sizeof texts / sizeof texts[0]; i++) {
        padded t = {.length = strlen(texts[i])};
        memcpy(t.chars, texts[i], t.length);
        t.chars[t.length] = '\n';
        const char *end = t.chars + t.length;
        double value = 0.0;
        assert_null(nw_number_scan(t.chars, end, '.', &value));
        assert_null(nw_number_scan_padded(t.chars, end, '.', &value));
    }
}

static void overflow_is_infinite(void **state)
{
    double value = 0.0;
    const char text[64] = "1e999\n", negative[64] = "-1e999\n";
    assert_ptr_equal(nw_number_scan_padded(text, text + 5, '.', &value), text + 5);
    assert_bits(value, INFINITY, text);
    assert_ptr_equal(nw_number_scan_padded(negative, negative + 6, '.', &value), negative + 6);
    assert_bits(value, -INFINITY, negative);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(random_numbers_as_strtod),
        cmocka_unit_test(doubles_come_back),
        cmocka_unit_test(hard_numbers),
        cmocka_unit_test(reads_up_to_what_is_no_number),
        cmocka_unit_test(no_number),
        cmocka_unit_test(overflow_is_infinite),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
