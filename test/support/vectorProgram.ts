/**
 * A firmware unit test in C99 and C++11 that uses nothing but the two headers: a straightforward filter by the contract's
 * arithmetic, in 128-bit integers so that every rule of overflow can be followed to the letter. Exits with 0 where all
 * outputs agree.
 */
export const integerProgram = `
#include <stdio.h>
#include "belt_taps.h"
#include "belt_vectors.h"
#include "belt_taps.h"
#include "belt_vectors.h"

__extension__ typedef __int128 wide;

static const int32_t means[BELT_INPUTS] = BELT_INPUT_MEANS;
static const double scales[BELT_INPUTS] = BELT_INPUT_COUNTS_PER_UNIT;

static wide held(wide value, int bits, int saturates)
{
    wide half = (wide)1 << (bits - 1);
    wide rest;
    if (saturates) return value >= half ? half - 1 : value < -half ? -half : value;
    rest = value % (2 * half);
    if (rest < 0) rest += 2 * half;
    return rest >= half ? rest - 2 * half : rest;
}

static wide floor_shift(wide value, int bits)
{
    wide unit = (wide)1 << bits;
    wide quotient = value / unit;
    return value % unit < 0 ? quotient - 1 : quotient;
}

static int64_t shift_of_the_comment(int64_t acc, int F)
{
    return acc >= 0 ? acc >> F : ~(~acc >> F);
}

int main(void)
{
    int n, r, k, wrong = 0;
    for (r = 0; r < BELT_INPUTS; r++) printf("%ld %.17g ", (long)means[r], scales[r]);
    for (n = 0; n < BELT_VECTOR_SAMPLES; n++) {
        wide acc = 0, y;
        for (r = 0; r < BELT_INPUTS; r++) {
            for (k = 0; k < BELT_LENGTH; k++) {
                int at = BELT_NEWEST_FIRST ? k : BELT_LENGTH - 1 - k;
                wide x = n >= k ? belt_input[r * BELT_VECTOR_SAMPLES + n - k] : 0;
                acc = held(acc + (wide)belt_taps[r * BELT_LENGTH + at] * x, BELT_ACCUMULATOR_BITS,
                           BELT_ACCUMULATOR_SATURATES);
            }
        }
        if (BELT_FRACTION_BITS > 0)
            acc = held(acc + ((wide)1 << (BELT_FRACTION_BITS > 0 ? BELT_FRACTION_BITS - 1 : 0)),
                       BELT_ACCUMULATOR_BITS, BELT_ACCUMULATOR_SATURATES);
        y = floor_shift(acc, BELT_FRACTION_BITS);
        if (y != shift_of_the_comment((int64_t)acc, BELT_FRACTION_BITS)) wrong++;
        if (held(y, BELT_OUTPUT_BITS, BELT_OUTPUT_SATURATES) != belt_expected[n]) wrong++;
    }
    printf("%d\\n", wrong);
    return wrong != 0;
}
`;

/** The same for float words: every product and every sum is rounded to the word. */
export function floatProgram(type: 'float' | 'double'): string {
  return `
#include <stdio.h>
#include "belt_taps.h"
#include "belt_vectors.h"

static const ${type} means[BELT_INPUTS] = BELT_INPUT_MEANS;

int main(void)
{
    int n, r, k, wrong = 0;
    printf("%.9g ", (double)means[0]);
    for (n = 0; n < BELT_VECTOR_SAMPLES; n++) {
        volatile ${type} acc = 0, product;
        for (r = 0; r < BELT_INPUTS; r++) {
            for (k = 0; k < BELT_LENGTH && k <= n; k++) {
                int at = BELT_NEWEST_FIRST ? k : BELT_LENGTH - 1 - k;
                product = belt_taps[r * BELT_LENGTH + at] * belt_input[r * BELT_VECTOR_SAMPLES + n - k];
                acc = acc + product;
            }
        }
        if (acc < belt_expected[n] || acc > belt_expected[n]) wrong++;
    }
    printf("%d\\n", wrong);
    return wrong != 0;
}
`;
}

/** Streams the vectors through the reference source. */
export const referenceProgram = (inputType: string) => `
#include <stdio.h>
#include "belt_filter.h"
#include "belt_taps.h"
#include "belt_vectors.h"

int main(void)
{
    belt_state state;
    int n, r, wrong = 0;
    belt_reset(&state);
    for (n = 0; n < BELT_VECTOR_SAMPLES; n++) {
        ${inputType} x[BELT_INPUTS];
        for (r = 0; r < BELT_INPUTS; r++) x[r] = belt_input[r * BELT_VECTOR_SAMPLES + n];
        if (belt_step(&state, x) != belt_expected[n]) wrong++;
    }
    (void)belt_taps;
    printf("%d wrong\\n", wrong);
    return wrong != 0;
}
`;
