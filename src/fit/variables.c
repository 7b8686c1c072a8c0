#include <stdlib.h>
#include <string.h>

#include "core/chars.h"
#include "slipcase/term.h"

void slip_variables_init(struct slip_variables *variables)
{
    *variables = (struct slip_variables){NULL, 0};
}

static void variable_clear(struct slip_variable *variable)
{
    slip_statistic_clear(&variable->statistic);
    slip_text_clear(&variable->name);
}

void slip_variables_clear(struct slip_variables *variables)
{
    for (size_t i = 0; i < variables->count; i++)
        variable_clear(&variables->items[i]);
    free(variables->items);
    slip_variables_init(variables);
}

/* Appends the variable, which the table owns from here on. */
static slip_status append(struct slip_variables *variables, struct slip_variable *variable,
                          struct slip_error *err)
{
    size_t bytes = (variables->count + 1) * sizeof *variables->items;
    struct slip_variable *items = realloc(variables->items, bytes);
    if (!items) {
        variable_clear(variable);
        return slip_fail_memory(err, bytes);
    }
    items[variables->count++] = *variable;
    variables->items = items;
    return SLIP_OK;
}

static bool is_name(const char *text, size_t length)
{
    for (size_t i = 0; i < length; i++) {
        char c = text[i];
        bool letter = (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
        if (!letter && (i == 0 || c < '0' || c > '9'))
            return false;
    }
    return length > 0;
}

/* Reads the variable in exactly these bytes. */
static slip_status read_variable(struct slip_variable *variable, const char *text, size_t length,
                                 struct slip_error *err)
{
    static const char parameter[] = "param(";
    const size_t opening = sizeof parameter - 1;
    *variable = (struct slip_variable){.kind = SLIP_VARIABLE_LENGTH};
    slip_statistic_init(&variable->statistic);
    slip_text_init(&variable->name);
    slip_status status = SLIP_OK;
    if (length == 1 && *text == 'n') {
        slip_text_char(&variable->name, 'n');
    } else if (length > opening && !memcmp(text, parameter, opening)) {
        if (text[length - 1] != ')' || !is_name(text + opening, length - opening - 1))
            return slip_fail_at(err, SLIP_USAGE, opening + 1, (uint32_t)(length - opening),
                                "expected the name of a parameter and a closing bracket");
        variable->kind = SLIP_VARIABLE_PARAMETER;
        slip_text_bytes(&variable->name, text, length);
    } else {
        variable->kind = SLIP_VARIABLE_STATISTIC;
        status = slip_statistic_parse(&variable->statistic, text, length, err);
        slip_text_string(&variable->name, slip_text_get(&variable->statistic.name));
    }
    if (status == SLIP_OK)
        status = slip_text_ok(&variable->name, err);
    if (status != SLIP_OK)
        variable_clear(variable);
    return status;
}

slip_status slip_variables_parse(struct slip_variables *variables, size_t *index, const char *text,
                                 size_t length, struct slip_error *err)
{
    size_t from = 0;
    while (from < length && slip_is_blank(text[from]))
        from++;
    while (length > from && slip_is_blank(text[length - 1]))
        length--;
    if (from == length)
        return slip_fail_at(err, SLIP_USAGE, from + 1, 1, "expected n, a statistic or param(NAME)");
    struct slip_variable variable;
    slip_status status = read_variable(&variable, text + from, length - from, err);
    if (status != SLIP_OK) {
        if (err && err->column)
            err->column += from;
        return status;
    }
    const char *name = slip_text_get(&variable.name);
    for (*index = 0; *index < variables->count; ++*index)
        if (!strcmp(slip_text_get(&variables->items[*index].name), name)) {
            variable_clear(&variable);
            return SLIP_OK;
        }
    return append(variables, &variable, err);
}

static slip_status measure_parameter(mpz_t value, const struct slip_variable *variable,
                                     slip_parameter_lookup parameter, void *context,
                                     struct slip_error *err)
{
    struct slip_text name;
    slip_text_init(&name);
    const char *written = slip_text_get(&variable->name); /* param(NAME) */
    slip_text_bytes(&name, written + 6, strlen(written) - 7);
    slip_status status = slip_text_ok(&name, err);
    if (status == SLIP_OK && (!parameter || !parameter(context, slip_text_get(&name), value)))
        status = slip_fail(err, SLIP_USAGE, "there is no parameter \"%s\" for this permutation",
                           slip_text_get(&name));
    slip_text_clear(&name);
    return status;
}

slip_status slip_variables_measure(mpz_t *values, const struct slip_variables *variables,
                                   const struct slip_perm *p, slip_parameter_lookup parameter,
                                   void *context, const struct slip_hooks *hooks,
                                   struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = 0; status == SLIP_OK && i < variables->count; i++) {
        const struct slip_variable *variable = &variables->items[i];
        switch (variable->kind) {
        case SLIP_VARIABLE_LENGTH:
            mpz_set_ui(values[i], p->n);
            break;
        case SLIP_VARIABLE_STATISTIC:
            status = slip_statistic_value(values[i], &variable->statistic, p, hooks, err);
            break;
        case SLIP_VARIABLE_PARAMETER:
            status = measure_parameter(values[i], variable, parameter, context, err);
            break;
        }
    }
    return status;
}
