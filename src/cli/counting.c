#include "cli/counting.h"

#include <string.h>

#include "cli/message.h"

static const struct option options[] = {
    {"-r", "R|A..B", false, "how many elements are inserted (default: 1)"},
    {"--engine", "NAME", false,
     "auto (default: the fastest one whose result is proved) or the name of one:\n"
     "formula, ceiling minus defect, r up to 3, any length, counts only;\n"
     "canonical, every result once through its first embedding;\n"
     "store, level by level through the hashed permutation store"},
};

const struct option_group counting_options = {"Counting", options,
                                              sizeof options / sizeof *options};

int counting_range(const struct call *call, struct range *r)
{
    const struct token *token = call_option(call, "-r");
    *r = (struct range){1, 1};
    return token ? value_range(call, token, r) : 0;
}

int counting_single(const struct call *call, uint32_t *r)
{
    const struct token *token = call_option(call, "-r");
    struct range range;
    int code = counting_range(call, &range);
    if (!code && strchr(token ? token->value : "", '.'))
        code = misuse(call, token->index, token->offset, strlen(token->value),
                      "-r takes a single number here, not '%s'", token->value);
    *r = code ? 0 : range.from;
    return code;
}

int counting_engine(const struct call *call, const struct slip_engine **engine)
{
    const struct token *token = call_option(call, "--engine");
    *engine = NULL;
    if (!token)
        return 0;
    const char *words[16] = {"auto"};
    size_t count, chosen;
    const struct slip_engine *const *list = slip_engine_list(&count);
    for (size_t i = 0; i < count && i < 15; i++)
        words[i + 1] = list[i]->name;
    int code = value_word(call, token, words, count + 1, &chosen);
    if (!code && chosen)
        *engine = list[chosen - 1];
    return code;
}

int counting_fits(const struct call *call, const struct slip_engine *engine,
                  const struct slip_source *source, uint32_t r, bool lists)
{
    if (engine && engine->most && r > engine->most)
        return misuse_missing(call, "the engine %s takes r up to %u; canonical and store take more",
                              engine->name, engine->most);
    uint64_t length = (uint64_t)slip_source_longest(source) + r;
    uint32_t most = engine ? engine->longest : 0;
    size_t count;
    const struct slip_engine *const *list = slip_engine_list(&count);
    bool unlimited = engine && !engine->longest;
    for (size_t i = 0; !engine && i < count; i++) {
        if ((list[i]->most && r > list[i]->most) || (lists && !list[i]->visit))
            continue;
        unlimited = unlimited || !list[i]->longest;
        most = list[i]->longest > most ? list[i]->longest : most;
    }
    if (unlimited || length <= most)
        return 0;
    complain(call, "n + r reaches %llu (n up to %u, r up to %u), and %s at most %u",
             (unsigned long long)length, slip_source_longest(source), r,
             engine ? "this engine takes" : "the engines take", most);
    return SLIP_LIMIT;
}

slip_status counting_name_row(slip_status status, const struct slip_row *row,
                              struct slip_error *err)
{
    if (status == SLIP_OK || status == SLIP_INTERRUPTED || !err || !err->message[0])
        return status;
    struct slip_text perm;
    slip_text_init(&perm);
    slip_perm_write(&perm, row->perm);
    char message[sizeof err->message];
    memcpy(message, err->message, sizeof message);
    size_t shown = perm.length; /* a long one is cut between elements */
    while (shown > 60 || (shown < perm.length && perm.data[shown] != ' '))
        shown--;
    slip_fail(err, status, "%.*s%s with r = %u: %.400s", (int)shown, slip_text_get(&perm),
              shown < perm.length ? " ..." : "", row->r, message);
    slip_text_clear(&perm);
    return status;
}
