#ifndef CASES_BOND_CLASSES_H
#define CASES_BOND_CLASSES_H

#include "slipcase/complements.h"

/* Sets classes and class_count from the positions. */
slip_status bond_classes(struct slip_complements *complements, struct slip_error *err);

#endif
