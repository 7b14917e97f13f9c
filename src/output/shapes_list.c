/* The shapes, made from their records. */
#include "base/text.h"
#include "notchwright/notch_factors.h"
#include "notchwright/notchwright.h"
#include "output/csv.h"
#include "output/json.h"
#include "output/page.h"

enum { LINE = 700 };

static void ranges_text(const nw_kt_formula *formula, char *text, size_t capacity)
{
    nw_text_builder out = nw_text_builder_on(text, capacity);
    for (const nw_shape_range *r = formula->ranges; r->ratio != NULL; r++) {
        nw_text_add(&out, "%s%s %g to %g", out.length > 0 ? ", " : "", r->ratio, r->low, r->high);
    }
    if (out.length == 0) {
        nw_text_add(&out, "everywhere");
    }
}

/* "; -6.4 to -1.7 % from 14 finite-element solutions", or "". */
static void accuracy_text(const nw_kt_formula *formula, char *text, size_t capacity)
{
    nw_text_builder out = nw_text_builder_on(text, capacity);
    if (formula->fe_points > 0) {
        nw_text_add(&out, "; %+g to %+g %% from %d finite-element solutions",
                    formula->fe_low_percent, formula->fe_high_percent, formula->fe_points);
    }
}

/* The shape at an index, or only the one asked for. */
static const nw_shape *shape_at(const nw_shape *only, size_t index)
{
    return only == NULL ? nw_shape_at(index) : index == 0 ? only : NULL;
}

/* ---- text ---- */

static void write_brief(FILE *to, const nw_shape *shape)
{
    char loads[120], line[LINE];
    const char *keys[NW_SHAPE_LOADS_MOST + 1] = {NULL};
    for (size_t i = 0; i < NW_SHAPE_LOADS_MOST && shape->loads[i] != NULL; i++) {
        keys[i] = shape->loads[i]->key;
    }
    fprintf(to, "  %s\n", shape->key);
    snprintf(line, sizeof line, "%s; needs %s; loads %s", shape->title, shape->needs,
             nw_text_join(loads, sizeof loads, keys));
    nw_page_paragraph(to, "      ", line);
}

static void write_load(FILE *to, const nw_shape_load *load)
{
    char line[LINE];
    fprintf(to, "\n  %s\n", load->key);
    nw_page_paragraph(to, "    nominal  ", load->nominal);
    nw_page_paragraph(to, "    Kt       ", load->kt_means);
    for (const nw_kt_formula *const *f = load->formulas; *f != NULL; f++) {
        char ranges[200], first[40], accuracy[100];
        accuracy_text(*f, accuracy, sizeof accuracy);
        ranges_text(*f, ranges, sizeof ranges);
        snprintf(first, sizeof first, "    %-11s ", (*f)->key);
        snprintf(line, sizeof line, "%s; for %s%s; %s", (*f)->equation, ranges, accuracy,
                 (*f)->source);
        nw_page_paragraph(to, first, line);
    }
}

static void write_whole(FILE *to, const nw_shape *shape)
{
    fprintf(to, "%s: %s\n", shape->key, shape->title);
    nw_page_paragraph(to, "  needs ", shape->needs);
    nw_page_paragraph(to, "  drawing: ", shape->applies);
    for (const nw_shape_size *row = shape->sizes; row->key != NULL; row++) {
        fprintf(to, "    %s%s%s  %s\n", row->key, row->other == NULL ? "" : " or ",
                row->other == NULL ? "" : row->other, row->meaning);
    }
    for (const nw_shape_load *const *load = shape->loads; *load != NULL; load++) {
        write_load(to, *load);
    }
}

nw_status nw_write_shapes_text(FILE *to, const nw_shape *only)
{
    if (only != NULL) {
        write_whole(to, only);
        return ferror(to) ? NW_FILE : NW_OK;
    }
    fputs("Shapes\n", to);
    const nw_shape *shape;
    for (size_t i = 0; (shape = nw_shape_at(i)) != NULL; i++) {
        write_brief(to, shape);
    }
    fputs("\nnotchwright notch SHAPE --list   sizes, nominal stresses, formulas, ranges, sources\n",
          to);
    return ferror(to) ? NW_FILE : NW_OK;
}

/* ---- JSON ---- */

/* Appends and takes over both; NULL when memory ran out. */
static json_t *append(json_t *list, json_t *item)
{
    if (json_array_append_new(list, item) != 0) { /* takes the item whatever comes */
        json_decref(list);
        return NULL;
    }
    return list;
}

static json_t *formulas_array(const nw_shape_load *load)
{
    json_t *list = json_array();
    for (const nw_kt_formula *const *f = load->formulas; *f != NULL; f++) {
        json_t *ranges = json_array();
        for (const nw_shape_range *r = (*f)->ranges; r->ratio != NULL; r++) {
            ranges = append(ranges, json_pack("{s:s, s:f, s:f}", "ratio", r->ratio, "low", r->low,
                                              "high", r->high));
        }
        list = append(list, json_pack("{s:s, s:s, s:s, s:o}", "name", (*f)->key, "equation",
                                      (*f)->equation, "source", (*f)->source, "ranges", ranges));
    }
    return list;
}

static json_t *loads_array(const nw_shape *shape)
{
    json_t *list = json_array();
    for (const nw_shape_load *const *l = shape->loads; *l != NULL; l++) {
        list =
            append(list, json_pack("{s:s, s:s, s:s, s:s, s:o}", "name", (*l)->key, "nominal",
                                   (*l)->nominal, "kt_means", (*l)->kt_means, "action",
                                   nw_action_name((*l)->action), "formulas", formulas_array(*l)));
    }
    return list;
}

static json_t *shape_object(const nw_shape *shape)
{
    json_t *sizes = json_array();
    for (const nw_shape_size *s = shape->sizes; s->key != NULL; s++) {
        sizes = append(sizes, json_pack("{s:s, s:o, s:s, s:s}", "name", s->key, "other",
                                        nw_json_text(s->other), "meaning", s->meaning, "dimension",
                                        nw_dimension_name(s->dimension)));
    }
    return json_pack("{s:s, s:s, s:s, s:s, s:o, s:o}", "name", shape->key, "title", shape->title,
                     "needs", shape->needs, "drawing", shape->applies, "sizes", sizes, "loads",
                     loads_array(shape));
}

nw_status nw_write_shapes_json(FILE *to, const nw_shape *only)
{
    json_t *list = json_array();
    const nw_shape *shape;
    for (size_t i = 0; (shape = shape_at(only, i)) != NULL; i++) {
        list = append(list, shape_object(shape));
    }
    return nw_json_put(to, json_pack("{s:s, s:s, s:o}", "format", "notchwright.shapes/1", "version",
                                     nw_version(), "shapes", list));
}

/* ---- CSV ---- */

static void write_rows(FILE *to, const nw_shape *shape, const nw_shape_load *load)
{
    for (const nw_kt_formula *const *f = load->formulas; *f != NULL; f++) {
        char ranges[200];
        ranges_text(*f, ranges, sizeof ranges);
        fprintf(to, "%s,%s,%s", shape->key, load->key, (*f)->key);
        nw_csv_text(to, load->nominal);
        nw_csv_text(to, ranges);
        nw_csv_text(to, (*f)->source);
        fputc('\n', to);
    }
}

nw_status nw_write_shapes_csv(FILE *to, const nw_shape *only)
{
    fputs("shape,load,formula,nominal,range,source\n", to);
    const nw_shape *shape;
    for (size_t i = 0; (shape = shape_at(only, i)) != NULL; i++) {
        for (const nw_shape_load *const *load = shape->loads; *load != NULL; load++) {
            write_rows(to, shape, *load);
        }
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
