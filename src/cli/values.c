#include "cli/values.h"

#include <stdio.h>
#include <string.h>
#include <strings.h>

#include "cli/message.h"

/* The decimal digits at *text, moved past; false without any. *beyond is set when they are more
 * than most, and left as it is otherwise. */
static bool digits(const char **text, uint64_t most, uint64_t *number, bool *beyond)
{
    const char *start = *text;
    uint64_t value = 0;
    for (; **text >= '0' && **text <= '9'; ++*text) {
        uint64_t digit = (uint64_t)(**text - '0');
        if (digit > most || value > (most - digit) / 10)
            *beyond = true;
        else
            value = 10 * value + digit;
    }
    *number = value;
    return *text > start;
}

int value_number(const struct call *call, const struct token *token, uint64_t least, uint64_t most,
                 uint64_t *number)
{
    const char *text = token->value;
    bool beyond = false, good = digits(&text, most, number, &beyond) && !*text;
    if (good && !beyond && *number >= least)
        return 0;
    if (most == UINT64_MAX && !beyond)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "%s takes a number from %llu on, not '%s'", token->option->name,
                      (unsigned long long)least, token->value);
    return misuse(call, token->index, token->offset, strlen(token->value),
                  "%s takes a number from %llu to %llu, not '%s'", token->option->name,
                  (unsigned long long)least, (unsigned long long)most, token->value);
}

int value_range(const struct call *call, const struct token *token, struct range *range)
{
    const char *text = token->value;
    uint64_t from, to;
    bool beyond = false, good = digits(&text, UINT32_MAX, &from, &beyond);
    to = from;
    if (good && !strncmp(text, "..", 2)) {
        text += 2;
        good = digits(&text, UINT32_MAX, &to, &beyond);
    }
    if (!good || *text)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "%s takes a number or a range such as 1..3, not '%s'", token->option->name,
                      token->value);
    if (beyond) {
        misuse(call, token->index, token->offset, strlen(token->value),
               "%s takes numbers up to %u, not '%s'", token->option->name, UINT32_MAX,
               token->value);
        return SLIP_LIMIT;
    }
    if (from > to)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "the range of %s runs backwards: %s", token->option->name, token->value);
    range->from = (uint32_t)from;
    range->to = (uint32_t)to;
    return 0;
}

int value_size(const struct call *call, const struct token *token, uint64_t *bytes)
{
    static const char letters[] = "KMGT";
    const char *text = token->value;
    unsigned shift = 0;
    bool beyond = false;
    bool good = digits(&text, UINT64_MAX, bytes, &beyond) && !beyond && *bytes > 0;
    if (good && *text && strchr(letters, *text & ~0x20)) {
        shift = 10 * (unsigned)(strchr(letters, *text & ~0x20) - letters + 1);
        text++;
        if (!strcasecmp(text, "iB") || !strcasecmp(text, "B"))
            text += strlen(text);
    } else if (good && !strcasecmp(text, "B")) {
        text++;
    }
    if (!good || *text || *bytes > UINT64_MAX >> shift)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "%s takes a size such as 500M or 8G, not '%s'", token->option->name,
                      token->value);
    *bytes <<= shift;
    return 0;
}

int value_word(const struct call *call, const struct token *token, const char *const *words,
               size_t count, size_t *chosen)
{
    for (size_t i = 0; i < count; i++)
        if (!strcmp(token->value, words[i])) {
            *chosen = i;
            return 0;
        }
    char list[256] = "";
    for (size_t i = 0; i < count; i++) {
        size_t used = strlen(list);
        snprintf(list + used, sizeof list - used, "%s%s", i ? (i + 1 < count ? ", " : " or ") : "",
                 words[i]);
    }
    const char *near = nearest(token->value, words, count);
    if (near)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "%s is %s, not '%s': did you mean '%s'?", token->option->name, list,
                      token->value, near);
    return misuse(call, token->index, token->offset, strlen(token->value), "%s is %s, not '%s'",
                  token->option->name, list, token->value);
}

int value_unknown(const struct call *call, const struct token *token, const char *kind,
                  const char *const *words, size_t count, size_t offset, size_t span)
{
    char text[40];
    snprintf(text, sizeof text, "%.*s", (int)span, token->value + offset);
    const char *near = span && span < sizeof text ? nearest(text, words, count) : NULL;
    if (near)
        return misuse(call, token->index, token->offset + offset, span,
                      "there is no %s '%s': did you mean '%s'?", kind, text, near);
    return misuse(call, token->index, token->offset + offset, span,
                  "there is no %s '%s' (see --help for their names)", kind, text);
}

int value_list(const struct call *call, const struct token *token, const char *kind,
               const char *const *words, size_t count, size_t *chosen, size_t *number)
{
    size_t offset = 0;
    *number = 0;
    for (;;) {
        size_t span = strcspn(token->value + offset, ","), word = 0;
        while (word < count &&
               (strlen(words[word]) != span || memcmp(words[word], token->value + offset, span)))
            word++;
        if (word == count)
            return value_unknown(call, token, kind, words, count, offset, span);
        for (size_t i = 0; i < *number; i++)
            if (chosen[i] == word)
                return misuse(call, token->index, token->offset + offset, span,
                              "%s '%s' is given twice", kind, words[word]);
        chosen[(*number)++] = word;
        offset += span;
        if (!token->value[offset++])
            return 0;
    }
}
