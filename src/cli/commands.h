#ifndef CLI_COMMANDS_H
#define CLI_COMMANDS_H

#include "cli/options.h"

extern const struct command command_count;
extern const struct command command_list;
extern const struct command command_insert;
extern const struct command command_delete;
extern const struct command command_contains;
extern const struct command command_statistics;
extern const struct command command_ceiling;
extern const struct command command_defect;
extern const struct command command_fit;
extern const struct command command_predict;
extern const struct command command_cases;
extern const struct command command_explain;
extern const struct command command_verify;

#endif
