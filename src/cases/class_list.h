#ifndef CASES_CLASS_LIST_H
#define CASES_CLASS_LIST_H

/* Classes of pairs, sorted by name, with two counts each. */

#include "slipcase/cases.h"

struct class_entry {
    struct slip_case name;
    uint64_t count[2];
};

struct class_list {
    struct class_entry *entries; /* owned */
    size_t count, capacity;
};

void class_list_init(struct class_list *list);
void class_list_clear(struct class_list *list); /* idempotent */

/* *entry = the entry of this name, made with counts 0 when there is none; valid until the next
 * call. O(log count), or O(count) for a new one. */
slip_status class_list_get(struct class_list *list, const struct slip_case *name,
                           struct class_entry **entry, struct slip_error *err);

#endif
