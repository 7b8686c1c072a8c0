#ifndef FAMILY_LEXER_H
#define FAMILY_LEXER_H

/* The text of an expression, token by token, and what its two parsers share. */

#include "family/family.h"

struct lexer {
    struct slip_family *family; /* under construction */
    size_t at;                  /* where the current token begins: blanks are skipped */
    size_t end;                 /* where the token before it ended */
    uint32_t depth;             /* of the recursion */
    struct slip_error *err;
};

/* The character that the current token begins with; '\0' at the end. */
char lexer_peek(const struct lexer *l);

/* The bytes of the name, or of the number, that begins here; 0 when there is none. */
size_t lexer_name(const struct lexer *l);
size_t lexer_number(const struct lexer *l);

/* Goes on past this many bytes, and the blanks after them. */
void lexer_skip(struct lexer *l, size_t bytes);

/* Skips the character if it is the next one. */
bool lexer_accept(struct lexer *l, char c);

/* SLIP_USAGE at the current token: "expected THIS, found THAT". */
slip_status lexer_expected(const struct lexer *l, const char *what);

/* Enters and leaves a level of recursion. */
slip_status lexer_enter(struct lexer *l);
void lexer_leave(struct lexer *l);

/* The children of a node that is yet to be made. */
struct children {
    uint32_t first, last, count;
};

#define NO_CHILDREN ((struct children){NO_NODE, NO_NODE, 0})

void lexer_adopt(struct lexer *l, struct children *children, uint32_t child);

/* Appends a node that begins at `from` and ends where the token before the current one ended;
 * *index is its index. */
slip_status lexer_node(struct lexer *l, enum node_kind kind, size_t from, struct children children,
                       uint32_t *index);

/* The two sorts of expressions. */
slip_status parse_number(struct lexer *l, uint32_t *index);
slip_status parse_permutation(struct lexer *l, uint32_t *index);

#endif
