#ifndef CLI_OPTIONS_H
#define CLI_OPTIONS_H

/*
 * Commands and their options as tables, and the arguments of one call as an ordered list of
 * tokens. Nothing here knows what an option means.
 */

#include <stdbool.h>
#include <stddef.h>

struct option {
    const char *name;  /* with its dashes */
    const char *value; /* what stands after it, for the help; NULL: it is a flag */
    bool many;         /* may be given more than once */
    const char *help;  /* one or more lines, separated by \n */
};

struct option_group {
    const char *title;
    const struct option *options;
    size_t count;
};

struct call;

struct command {
    const char *name;
    const char *summary;                      /* one line */
    const char *usage;                        /* what stands after "slipcase NAME " */
    const char *examples;                     /* the first thing that --help shows */
    const char *details;                      /* output columns and the like; the end of --help */
    const struct option_group *const *groups; /* ends with NULL */
    int (*run)(struct call *call);            /* the exit code */
};

struct token {
    const struct option *option; /* NULL: a positional argument */
    const char *value;           /* the option's value, or the argument; NULL for a flag */
    int index;                   /* the argv entry that holds the value (or the flag) */
    size_t offset;               /* where in that entry the value begins */
};

struct call {
    const struct command *command;
    int argc;
    char **argv; /* argv[0] program, argv[1] command */
    struct token *tokens;
    size_t count;
};

/*
 * Splits argv into tokens: `--name value`, `--name=value`, `-r 3`, `-r3`, arguments; `--` ends the
 * options. On misuse prints what is wrong and returns 2; 0 otherwise. With --help among the
 * options stops there and sets *help.
 */
int call_parse(struct call *call, const struct command *command, int argc, char **argv, bool *help);
void call_clear(struct call *call);

/* The token of this option (the first one), or NULL. */
const struct token *call_option(const struct call *call, const char *name);

/* The value of this option, or `otherwise` when it is not given. */
const char *call_value(const struct call *call, const char *name, const char *otherwise);

bool call_flag(const struct call *call, const char *name);

/* The nearest of the candidates by edit distance, or NULL when none is near. */
const char *nearest(const char *word, const char *const *candidates, size_t count);

#endif
