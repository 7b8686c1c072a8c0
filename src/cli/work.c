#include "cli/work.h"

#include <signal.h>
#include <stdio.h>
#include <string.h>
#include <sys/ioctl.h>
#include <unistd.h>

#include "cli/clock.h"
#include "cli/memory.h"
#include "cli/message.h"
#include "cli/values.h"

static const struct option options[] = {
    {"--memory", "SIZE", false,
     "memory that may be used, such as 500M or 8G (default: three quarters\n"
     "of what is available)"},
    {"--threads", "K", false, "threads to work with (default: all processors)"},
};

const struct option_group work_options = {"Limits", options, sizeof options / sizeof *options};

/* The only global state of the program: what a signal handler can reach. */
static volatile sig_atomic_t interrupt_wanted;

static void on_signal(int number)
{
    interrupt_wanted = 1;
    signal(number, SIG_DFL); /* a second one ends the program at once */
}

static bool interrupted(void *context)
{
    (void)context;
    return interrupt_wanted;
}

static unsigned terminal_width(void)
{
    struct winsize size;
    if (ioctl(STDERR_FILENO, TIOCGWINSZ, &size) == 0 && size.ws_col >= 20)
        return size.ws_col;
    return 80;
}

/* "12 of 720 rows, 1 4 2 3 (r = 3) 40 %, 1.2e+08 results/s". Drawn at most five times a second. */
static void show(void *context, double done, double all)
{
    struct work *work = context;
    double now = clock_now();
    if (!work->shows || now - work->begun < 1 || now - work->last < 0.2)
        return;
    work->last = now;
    char line[256];
    int used = snprintf(line, sizeof line, "%.0f", work->rows);
    if (work->total > 0)
        used += snprintf(line + used, sizeof line - (size_t)used, " of %.0f", work->total);
    used += snprintf(line + used, sizeof line - (size_t)used, " rows, %.1f s", now - work->begun);
    if (work->results > 0)
        used += snprintf(line + used, sizeof line - (size_t)used, ", %.3g results/s",
                         work->results / (now - work->begun));
    if (work->label[0])
        used += snprintf(line + used, sizeof line - (size_t)used, "; now %s", work->label);
    if (all > 0 && done > 0)
        snprintf(line + used, sizeof line - (size_t)used, " %.0f %%, about %.0f s left",
                 100 * done / all, (now - work->row_begun) * (all - done) / done);
    unsigned width = terminal_width() - 1;
    fprintf(stderr, "\r%.*s\033[K", (int)width, line);
    fflush(stderr);
    work->shown = true;
}

int work_begin(struct work *work, const struct call *call)
{
    *work = (struct work){.hooks = {.interrupted = interrupted, .progress = show}};
    work->hooks.context = work;
    work->begun = work->row_begun = work->last = clock_now();
    work->shows = isatty(STDERR_FILENO) && !call_flag(call, "--quiet");
    const struct token *memory = call_option(call, "--memory");
    const struct token *threads = call_option(call, "--threads");
    uint64_t number = 0;
    int code = memory ? value_size(call, memory, &work->hooks.memory) : 0;
    if (!memory)
        work->hooks.memory = memory_available() / 4 * 3;
    if (!code && threads)
        code = value_number(call, threads, 1, 1024, &number);
    work->hooks.threads = (unsigned)number;
    struct sigaction action = {.sa_handler = on_signal};
    sigemptyset(&action.sa_mask);
    sigaction(SIGINT, &action, NULL);
    sigaction(SIGTERM, &action, NULL);
    return code;
}

void work_label(struct work *work, const struct slip_perm *perm, int64_t r)
{
    size_t used = 0;
    for (uint32_t i = 0; i < perm->n && used < 40; i++)
        used += (size_t)snprintf(work->label + used, sizeof work->label - used, "%s%u",
                                 i ? " " : "", perm->at[i]);
    used += (size_t)snprintf(work->label + used, sizeof work->label - used, "%s",
                             perm->n == 0 ? "()"
                             : used >= 40 ? " ..."
                                          : "");
    if (r >= 0)
        snprintf(work->label + used, sizeof work->label - used, " (r = %lld)", (long long)r);
    work->row_begun = clock_now();
    show(work, 0, 0);
}

void work_hide(struct work *work)
{
    if (work->shown)
        fputs("\r\033[K", stderr);
    work->shown = false;
}

void work_end(struct work *work, const struct call *call, bool table)
{
    work_hide(work);
    double seconds = clock_now() - work->begun;
    if (!table || call_flag(call, "--quiet"))
        return;
    fprintf(stderr, "%.0f row%s in %.2f s", work->rows, work->rows == 1 ? "" : "s", seconds);
    if (work->results > 0)
        fprintf(stderr, ", %.3g result%s, %.3g results a second", work->results,
                work->results == 1 ? "" : "s", work->results / (seconds > 1e-6 ? seconds : 1e-6));
    fputc('\n', stderr);
}
