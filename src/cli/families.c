#include "cli/families.h"

#include <string.h>

#include "cli/message.h"

static bool same_name(const struct slip_binding *binding, const char *name)
{
    return binding->length == strlen(name) && !memcmp(binding->name, name, binding->length);
}

int family_bind(struct family_request *request, const struct call *call, const struct token *token)
{
    struct slip_binding binding = {.name = "n", .length = 1};
    struct slip_error err = SLIP_ERROR_NONE;
    size_t length = strlen(token->value);
    bool is_n = !strcmp(token->option->name, "--n");
    slip_status status = is_n ? slip_binding_parse_values(&binding, token->value, length, &err)
                              : slip_binding_parse(&binding, token->value, length, &err);
    if (status != SLIP_OK)
        return complain_token(call, token, &err);
    for (size_t i = 0; i < request->count; i++)
        if (request->bindings[i].length == binding.length &&
            !memcmp(request->bindings[i].name, binding.name, binding.length))
            return misuse(call, token->index, token->offset, length,
                          "'%.*s' is given twice for one --family", (int)binding.length,
                          binding.name);
    if (request->count == SLIP_FAMILY_PARAMETERS)
        return misuse(call, token->index, token->offset, length,
                      "a family has at most %d parameters", SLIP_FAMILY_PARAMETERS);
    request->tokens[request->count] = token;
    request->bindings[request->count++] = binding;
    return 0;
}

/* Each parameter has a value, and each value a parameter. */
static int check(const struct family_request *request, const struct call *call,
                 const struct token *token, const struct slip_family *family)
{
    size_t count = slip_family_parameter_count(family);
    bool used[SLIP_FAMILY_PARAMETERS] = {false};
    for (size_t p = 0; p < count; p++) {
        const char *name = slip_family_parameter(family, p);
        size_t i = 0;
        while (i < request->count && !same_name(&request->bindings[i], name))
            i++;
        if (i < request->count) {
            used[i] = true;
            continue;
        }
        bool is_n = !strcmp(name, "n");
        return misuse(call, token->index,
                      token->offset + (size_t)slip_family_parameter_column(family, p) - 1,
                      strlen(name), "'%s' has no value: expected %s%s%s after the --family", name,
                      is_n ? "--n A..B" : "--let ", is_n ? "" : name, is_n ? "" : "=A..B");
    }
    for (size_t i = 0; i < request->count; i++)
        if (!used[i])
            return misuse(call, request->tokens[i]->index, request->tokens[i]->offset,
                          strlen(request->tokens[i]->value),
                          "there is no parameter '%.*s' in the expression of the --family",
                          (int)request->bindings[i].length, request->bindings[i].name);
    return 0;
}

int family_add(const struct family_request *request, const struct call *call,
               const struct token *token, struct slip_source *source)
{
    struct slip_family *family;
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_family_parse(&family, token->value, strlen(token->value), &err) != SLIP_OK)
        return complain_token(call, token, &err);
    int code = check(request, call, token, family);
    slip_family_free(family);
    if (!code && slip_source_add_family(source, token->value, request->bindings, request->count,
                                        &err) != SLIP_OK)
        code = complain_token(call, token, &err);
    return code;
}
