#include "output/json.h"

#include <string.h>

json_t *nw_json_text(const char *text)
{
    if (text == NULL || text[0] == '\0') {
        return json_null();
    }
    json_t *value = json_string(text);
    if (value != NULL) {
        return value;
    }
    char plain[512];
    size_t length = strlen(text);
    length = length < sizeof plain ? length : sizeof plain - 1;
    for (size_t i = 0; i < length; i++) {
        plain[i] = (unsigned char)text[i] < 0x80 ? text[i] : '?';
    }
    plain[length] = '\0';
    return json_string(plain);
}

json_t *nw_json_count(double value)
{
    bool whole = value == floor(value) && fabs(value) < 9e15;
    return whole ? json_integer((json_int_t)value) : nw_json_number(value);
}

json_t *nw_json_cautions(const nw_cautions *cautions)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < cautions->count; i++) {
        const nw_caution *c = &cautions->items[i];
        json_t *item =
            json_pack("{s:s, s:s, s:s}", "code", c->code, "about", c->about, "text", c->text);
        if (item == NULL || json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

nw_status nw_json_put(FILE *to, json_t *object)
{
    if (object == NULL) {
        return NW_MEMORY;
    }
    int failed = json_dumpf(object, to, JSON_INDENT(1) | NW_JSON_FLAGS);
    json_decref(object);
    fputc('\n', to);
    return ferror(to) ? NW_FILE : failed ? NW_MEMORY : NW_OK;
}
