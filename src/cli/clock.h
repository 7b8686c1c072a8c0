#ifndef CLI_CLOCK_H
#define CLI_CLOCK_H

/* Seconds on a clock that only moves forward. */
double clock_now(void);

#endif
