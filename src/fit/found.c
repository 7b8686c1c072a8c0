#include <stdlib.h>
#include <string.h>

#include "fit/search.h"

void slip_search_init(struct slip_search *search)
{
    *search = (struct slip_search){NULL, 0, 0, 0, false};
}

static void found_clear(struct slip_found *found)
{
    free(found->chosen);
    slip_terms_clear(&found->terms);
    slip_fits_clear(&found->fits);
}

void slip_search_clear(struct slip_search *search)
{
    for (size_t i = 0; i < search->count; i++)
        found_clear(&search->items[i]);
    free(search->items);
    slip_search_init(search);
}

/* Both ascending. */
static bool is_part(const struct slip_found *found, const size_t *chosen, size_t count)
{
    size_t at = 0;
    for (size_t i = 0; i < found->count; i++) {
        while (at < count && chosen[at] < found->chosen[i])
            at++;
        if (at == count || chosen[at] != found->chosen[i])
            return false;
    }
    return true;
}

bool found_contains(const struct slip_search *search, const size_t *chosen, size_t count)
{
    for (size_t i = 0; i < search->count; i++)
        if (is_part(&search->items[i], chosen, count))
            return true;
    return false;
}

bool found_enough(const struct slip_search *search)
{
    for (size_t i = 0; i < search->count; i++)
        if (search->items[i].fits.items[0].exact)
            return true;
    return false;
}

/* Smaller sets first; of one size those that are exact first, else in the order of the search. */
static slip_status insert(struct slip_search *search, const struct slip_found *found,
                          struct slip_error *err)
{
    size_t bytes = (search->count + 1) * sizeof *search->items;
    struct slip_found *items = realloc(search->items, bytes);
    if (!items)
        return slip_fail_memory(err, bytes);
    search->items = items;
    size_t at = search->count++;
    while (at > 0 && items[at - 1].count == found->count && found->fits.items[0].exact &&
           !items[at - 1].fits.items[0].exact) {
        items[at] = items[at - 1];
        at--;
    }
    items[at] = *found;
    return SLIP_OK;
}

static slip_status make(struct slip_found *found, const struct slip_search_plan *plan,
                        const size_t *chosen, size_t count, struct slip_error *err)
{
    const struct slip_terms *terms = plan->fit.terms;
    *found = (struct slip_found){.count = count};
    slip_terms_init(&found->terms);
    slip_fits_init(&found->fits);
    found->chosen = malloc((count + 1) * sizeof *found->chosen);
    if (!found->chosen)
        return slip_fail_memory(err, count * sizeof *found->chosen);
    memcpy(found->chosen, chosen, count * sizeof *chosen);
    slip_status status = SLIP_OK;
    for (size_t i = 0; status == SLIP_OK && i < terms->count; i++)
        status = slip_terms_add(&found->terms, &terms->items[i], err);
    for (size_t i = 0; status == SLIP_OK && i < count; i++)
        status = slip_terms_add(&found->terms, &plan->choices->items[chosen[i]], err);
    return status;
}

slip_status found_confirm(struct slip_search *search, struct slip_samples *samples,
                          const struct slip_search_plan *plan, const size_t *chosen, size_t count,
                          const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_found found;
    struct slip_fit_plan fit = plan->fit;
    slip_status status = make(&found, plan, chosen, count, err);
    fit.terms = &found.terms;
    if (status == SLIP_OK)
        status = slip_fit(&found.fits, samples, &fit, hooks, err);
    bool keep = status == SLIP_OK && !found.fits.items[0].missed && found.fits.items[0].enough;
    if (keep)
        status = insert(search, &found, err);
    if (!keep || status != SLIP_OK)
        found_clear(&found);
    return status;
}
