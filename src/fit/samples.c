#include <errno.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "core/size.h"
#include "core/unnamed.h"
#include "slipcase/sample.h"

/*
 * A record: struct head, then the elements (one byte each up to n = 255, else four), then the
 * figure and the variables, each as a signed 32-bit number of bytes (negative for a negative
 * integer) and the bytes, least significant first.
 */
struct head {
    uint64_t weight;
    uint32_t n;
};

struct slip_samples {
    FILE *file;
    size_t variables;
    uint64_t count, bytes;
    uint64_t read; /* records read since the last rewind */
    unsigned char *scratch;
    size_t room; /* bytes in scratch */
};

slip_status slip_samples_new(struct slip_samples **samples, size_t variables,
                             struct slip_error *err)
{
    *samples = calloc(1, sizeof **samples);
    if (!*samples)
        return slip_fail_memory(err, sizeof **samples);
    (*samples)->variables = variables;
    int fd;
    slip_status status = slip_unnamed_open(&fd, "cannot make a temporary file for the rows", err);
    if (status == SLIP_OK) {
        (*samples)->file = fdopen(fd, "w+b");
        if (!(*samples)->file) {
            close(fd);
            status = slip_fail_memory(err, BUFSIZ);
        }
    }
    if (status != SLIP_OK) {
        free(*samples);
        *samples = NULL;
    }
    return status;
}

void slip_samples_free(struct slip_samples *samples)
{
    if (!samples)
        return;
    fclose(samples->file);
    free(samples->scratch);
    free(samples);
}

uint64_t slip_samples_count(const struct slip_samples *samples)
{
    return samples->count;
}

uint64_t slip_samples_bytes(const struct slip_samples *samples)
{
    return samples->bytes;
}

static slip_status broken(const struct slip_samples *samples, const char *what,
                          struct slip_error *err)
{
    char reason[128] = "it is too short", size[32];
    if (errno)
        strerror_r(errno, reason, sizeof reason);
    slip_size_write(size, sizeof size, (double)samples->bytes);
    return slip_fail(err, SLIP_IO, "cannot %s the temporary file of rows, which holds %s: %s", what,
                     size, reason);
}

static slip_status room(struct slip_samples *samples, size_t bytes, struct slip_error *err)
{
    if (bytes <= samples->room)
        return SLIP_OK;
    unsigned char *scratch = realloc(samples->scratch, bytes);
    if (!scratch)
        return slip_fail_memory(err, bytes);
    samples->scratch = scratch;
    samples->room = bytes;
    return SLIP_OK;
}

static slip_status put(struct slip_samples *samples, const void *data, size_t bytes,
                       struct slip_error *err)
{
    errno = 0;
    if (bytes && fwrite(data, bytes, 1, samples->file) != 1)
        return broken(samples, "write to", err);
    samples->bytes += bytes;
    return SLIP_OK;
}

static slip_status get(struct slip_samples *samples, void *data, size_t bytes,
                       struct slip_error *err)
{
    errno = 0;
    if (bytes && fread(data, bytes, 1, samples->file) != 1)
        return broken(samples, "read", err);
    return SLIP_OK;
}

static slip_status put_integer(struct slip_samples *samples, const mpz_t z, struct slip_error *err)
{
    size_t bytes = mpz_sgn(z) ? (mpz_sizeinbase(z, 2) + 7) / 8 : 0;
    if (bytes > INT32_MAX)
        return slip_fail(err, SLIP_LIMIT, "an integer of %zu bytes is too long for a row", bytes);
    slip_status status = room(samples, bytes, err);
    if (status != SLIP_OK)
        return status;
    int32_t size = mpz_sgn(z) < 0 ? -(int32_t)bytes : (int32_t)bytes;
    mpz_export(samples->scratch, NULL, -1, 1, 0, 0, z);
    status = put(samples, &size, sizeof size, err);
    if (status == SLIP_OK)
        status = put(samples, samples->scratch, bytes, err);
    return status;
}

static slip_status get_integer(struct slip_samples *samples, mpz_t z, struct slip_error *err)
{
    int32_t size;
    slip_status status = get(samples, &size, sizeof size, err);
    if (status != SLIP_OK)
        return status;
    size_t bytes = (size_t)(size < 0 ? -size : size);
    status = room(samples, bytes, err);
    if (status == SLIP_OK)
        status = get(samples, samples->scratch, bytes, err);
    if (status != SLIP_OK)
        return status;
    mpz_import(z, bytes, -1, 1, 0, 0, samples->scratch);
    if (size < 0)
        mpz_neg(z, z);
    return SLIP_OK;
}

static slip_status put_perm(struct slip_samples *samples, const struct slip_perm *p,
                            struct slip_error *err)
{
    if (p->n > UINT8_MAX)
        return put(samples, p->at, (size_t)p->n * sizeof *p->at, err);
    unsigned char small[UINT8_MAX];
    for (uint32_t i = 0; i < p->n; i++)
        small[i] = (unsigned char)p->at[i];
    return put(samples, small, p->n, err);
}

static slip_status get_perm(struct slip_samples *samples, struct slip_perm *p, uint32_t n,
                            struct slip_error *err)
{
    slip_status status = slip_perm_resize(p, n, err);
    if (status != SLIP_OK)
        return status;
    if (n > UINT8_MAX)
        return get(samples, p->at, (size_t)n * sizeof *p->at, err);
    unsigned char small[UINT8_MAX];
    status = get(samples, small, n, err);
    for (uint32_t i = 0; status == SLIP_OK && i < n; i++)
        p->at[i] = small[i];
    return status;
}

slip_status slip_samples_add(struct slip_samples *samples, const struct slip_perm *perm,
                             const mpz_t value, unsigned long weight, const mpz_t *variables,
                             struct slip_error *err)
{
    struct head head;
    memset(&head, 0, sizeof head); /* no undefined padding on the disk */
    head.weight = weight;
    head.n = perm->n;
    slip_status status = put(samples, &head, sizeof head, err);
    if (status == SLIP_OK)
        status = put_perm(samples, perm, err);
    if (status == SLIP_OK)
        status = put_integer(samples, value, err);
    for (size_t i = 0; status == SLIP_OK && i < samples->variables; i++)
        status = put_integer(samples, variables[i], err);
    if (status == SLIP_OK)
        samples->count++;
    return status;
}

slip_status slip_sample_init(struct slip_sample *sample, const struct slip_samples *samples,
                             struct slip_error *err)
{
    *sample = (struct slip_sample){.count = samples->variables};
    slip_perm_init(&sample->perm);
    mpz_init(sample->value);
    sample->variables = malloc((sample->count + 1) * sizeof *sample->variables);
    if (!sample->variables) {
        sample->count = 0;
        return slip_fail_memory(err, samples->variables * sizeof *sample->variables);
    }
    for (size_t i = 0; i < sample->count; i++)
        mpz_init(sample->variables[i]);
    return SLIP_OK;
}

void slip_sample_clear(struct slip_sample *sample)
{
    slip_perm_clear(&sample->perm);
    mpz_clear(sample->value);
    mpz_init(sample->value); /* takes no memory until it is set */
    for (size_t i = 0; i < sample->count; i++)
        mpz_clear(sample->variables[i]);
    free(sample->variables);
    sample->variables = NULL;
    sample->count = 0;
}

slip_status slip_samples_rewind(struct slip_samples *samples, struct slip_error *err)
{
    errno = 0;
    samples->read = 0;
    if (fflush(samples->file) || fseeko(samples->file, 0, SEEK_SET))
        return broken(samples, "write to", err);
    return SLIP_OK;
}

slip_status slip_samples_next(struct slip_samples *samples, struct slip_sample *sample, bool *more,
                              struct slip_error *err)
{
    *more = samples->read < samples->count;
    if (!*more)
        return SLIP_OK;
    struct head head;
    slip_status status = get(samples, &head, sizeof head, err);
    if (status == SLIP_OK)
        status = get_perm(samples, &sample->perm, head.n, err);
    if (status == SLIP_OK)
        status = get_integer(samples, sample->value, err);
    for (size_t i = 0; status == SLIP_OK && i < sample->count; i++)
        status = get_integer(samples, sample->variables[i], err);
    sample->weight = head.weight;
    sample->index = samples->read++;
    return status;
}
