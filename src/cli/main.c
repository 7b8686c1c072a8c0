/* The program: finds the command, and knows nothing else. */
#include <fcntl.h>
#include <stdio.h>
#include <string.h>
#include <unistd.h>

#include "cli/commands.h"
#include "cli/help.h"
#include "cli/memory.h"
#include "cli/message.h"

static const struct command *const commands[] = {
    &command_count,      &command_list,    &command_insert,  &command_delete, &command_contains,
    &command_statistics, &command_fit,     &command_predict, &command_cases,  &command_explain,
    &command_verify,     &command_ceiling, &command_defect,
};
enum { COMMANDS = sizeof commands / sizeof *commands };

static int unknown_command(int argc, char **argv)
{
    struct call call = {.argc = argc, .argv = argv};
    const char *names[COMMANDS];
    for (size_t i = 0; i < COMMANDS; i++)
        names[i] = commands[i]->name;
    const char *near = nearest(argv[1], names, COMMANDS);
    if (near)
        return misuse(&call, 1, 0, strlen(argv[1]), "unknown command '%s': did you mean '%s'?",
                      argv[1], near);
    return misuse(&call, 1, 0, strlen(argv[1]), "unknown command '%s'", argv[1]);
}

static int run(const struct command *command, int argc, char **argv)
{
    struct call call;
    bool help;
    int code = call_parse(&call, command, argc, argv, &help);
    if (!code)
        code = help ? help_command(&call) : command->run(&call);
    call_clear(&call);
    return code;
}

/* A file opened for a closed standard stream would take its number: rows would go into it. */
static void hold_standard_streams(void)
{
    for (int fd = 0; fd <= 2; fd++)
        if (fcntl(fd, F_GETFD) == -1)
            (void)!open("/dev/null", fd == 1 ? O_RDONLY : O_RDWR); /* writing to 1 still fails */
}

int main(int argc, char **argv)
{
    hold_standard_streams();
    memory_for_numbers();
    struct call call = {.argc = argc, .argv = argv};
    if (argc < 2)
        return misuse_missing(&call, "no command given");
    if (!strcmp(argv[1], "--help") || !strcmp(argv[1], "help"))
        return help_program(&call, commands, COMMANDS);
    if (!strcmp(argv[1], "--version"))
        return help_version(&call);
    for (size_t i = 0; i < COMMANDS; i++)
        if (!strcmp(argv[1], commands[i]->name))
            return run(commands[i], argc, argv);
    return unknown_command(argc, argv);
}
