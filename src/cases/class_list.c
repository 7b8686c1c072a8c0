#include "cases/class_list.h"

#include <stdlib.h>
#include <string.h>

void class_list_init(struct class_list *list)
{
    *list = (struct class_list){NULL, 0, 0};
}

void class_list_clear(struct class_list *list)
{
    free(list->entries);
    class_list_init(list);
}

static slip_status insert(struct class_list *list, size_t at, const struct slip_case *name,
                          struct slip_error *err)
{
    if (list->count == list->capacity) {
        size_t capacity = list->capacity ? 2 * list->capacity : 32;
        struct class_entry *grown = realloc(list->entries, capacity * sizeof *grown);
        if (!grown)
            return slip_fail_memory(err, capacity * sizeof *grown);
        list->entries = grown;
        list->capacity = capacity;
    }
    memmove(list->entries + at + 1, list->entries + at, (list->count - at) * sizeof *list->entries);
    list->entries[at] = (struct class_entry){*name, {0, 0}};
    list->count++;
    return SLIP_OK;
}

slip_status class_list_get(struct class_list *list, const struct slip_case *name,
                           struct class_entry **entry, struct slip_error *err)
{
    size_t low = 0, high = list->count;
    while (low < high) {
        size_t middle = low + (high - low) / 2;
        if (slip_case_compare(&list->entries[middle].name, name) < 0)
            low = middle + 1;
        else
            high = middle;
    }
    slip_status status = SLIP_OK;
    if (low == list->count || slip_case_compare(&list->entries[low].name, name))
        status = insert(list, low, name, err);
    if (status == SLIP_OK)
        *entry = &list->entries[low];
    return status;
}
