#ifndef FAMILY_FAMILY_H
#define FAMILY_FAMILY_H

/*
 * A parsed expression: an array of nodes, children before their parents. Nodes are of two sorts,
 * numbers (up to NODE_POWER) and permutations.
 */

#include "slipcase/family.h"

enum node_kind {
    NODE_NUMBER,    /* number */
    NODE_PARAMETER, /* index */
    NODE_NEGATE,
    NODE_ADD,
    NODE_SUBTRACT,
    NODE_MULTIPLY,
    NODE_DIVIDE,
    NODE_MODULO,
    NODE_POWER,
    NODE_LITERAL, /* index */
    NODE_UP,      /* a number */
    NODE_DOWN,
    NODE_LAYERED, /* numbers */
    NODE_COPIES,  /* a number, a permutation */
    NODE_SKEW_COPIES,
    NODE_SUM, /* permutations */
    NODE_SKEW,
    NODE_INFLATE, /* the permutation to inflate, and what it is inflated by */
    NODE_INVERSE, /* a permutation */
    NODE_REVERSE,
    NODE_COMPLEMENT,
};

enum { NO_NODE = UINT32_MAX };

struct node {
    enum node_kind kind;
    uint32_t first, count; /* the children: first, then along `next` */
    uint32_t next;         /* the parent's next child, or NO_NODE */
    size_t from, to;       /* where it stands in the text */
    int64_t number;
    uint32_t index; /* of the parameter or the literal */
};

struct slip_family {
    char *text; /* owned copy, NUL-terminated */
    size_t length;
    struct node *nodes;
    uint32_t count, capacity;
    uint32_t root;
    struct slip_perm *literals;
    uint32_t literals_count;
    char *parameters[SLIP_FAMILY_PARAMETERS]; /* names, owned */
    uint32_t parameters_count;
};

/* The text of a node for messages: %.*s of family_shown and family_text. */
int family_shown(const struct node *node);
const char *family_text(const struct slip_family *family, const struct node *node);

/* ---- values (evaluate.c) ---- */

/* What the nodes come to for one choice of parameters. */
struct family_values {
    const struct slip_family *family;
    const int64_t *parameters;
    int64_t *numbers; /* a node: its value, or the length of its permutation */
    double *peaks;    /* a node: bytes held at once while its permutation is built */
    struct slip_error *err;
};

/* Computes the values of all nodes, with all checks but that of memory; free with clear. */
slip_status family_values_compute(struct family_values *v, const struct slip_family *family,
                                  const int64_t *parameters, struct slip_error *err);
void family_values_clear(struct family_values *v);

/* A failure at this node; the values of the parameters are added to the message. */
slip_status family_fail(const struct family_values *v, slip_status status, const struct node *node,
                        const char *format, ...) SLIP_PRINTF(4, 5);

/* The value of an arithmetic node whose children are done (arithmetic.c). */
slip_status family_arithmetic(struct family_values *v, uint32_t node);

#endif
