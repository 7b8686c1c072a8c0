/*
 * The registry: STATISTIC(name, argument, invariant, reversed, definition, cost, source), a line a
 * statistic, in the order in which they are listed. The fields are those of
 * struct slip_statistic_kind; statistic_NAME computes it. No include guard: included wherever
 * STATISTIC is defined.
 *
 * Masks of the symmetries that leave a statistic the same: with a line's name, reflection in that
 * line (and the identity).
 */
#define ALL 0xFF              /* all eight */
#define ONE 0x01              /* the identity alone */
#define HALF_TURN 0x09        /* reverse-complement */
#define DIAGONALS 0x99        /* inverse, reverse-complement and their product */
#define RISING_DIAGONAL 0x11  /* inverse: reflection in the rising diagonal */
#define FALLING_DIAGONAL 0x81 /* reflection in the falling diagonal */
#define LEFT_RIGHT 0x03       /* reverse */
#define UP_DOWN 0x05          /* complement */

STATISTIC(n, PLAIN, ALL, "n", "the length", "O(1)", "definition")
STATISTIC(fixed_points, PLAIN, DIAGONALS, NULL,
          "elements that stand at the position of their value", "O(n)", "definition")
STATISTIC(descents, PLAIN, HALF_TURN, NULL, "positions whose element is greater than the next one",
          "O(n)", "definition")
STATISTIC(inversions, PLAIN, DIAGONALS, NULL, "pairs of elements of which the greater stands first",
          "O(n log n)",
          "P. Fenwick, A new data structure for cumulative frequency tables, Software: Practice "
          "and Experience 24 (1994)")
STATISTIC(bonds, PLAIN, ALL, "bonds", "pairs of neighbouring positions with neighbouring values",
          "O(n)", "definition")
STATISTIC(rising_bonds, PLAIN, DIAGONALS, "falling_bonds",
          "bonds whose greater element stands second", "O(n)", "definition")
STATISTIC(falling_bonds, PLAIN, DIAGONALS, "rising_bonds",
          "bonds whose greater element stands first", "O(n)", "definition")
STATISTIC(lr_maxima, PLAIN, FALLING_DIAGONAL, "rl_maxima",
          "elements greater than all that stand to their left", "O(n)", "definition")
STATISTIC(lr_minima, PLAIN, RISING_DIAGONAL, "rl_minima",
          "elements smaller than all that stand to their left", "O(n)", "definition")
STATISTIC(rl_maxima, PLAIN, RISING_DIAGONAL, "lr_maxima",
          "elements greater than all that stand to their right", "O(n)", "definition")
STATISTIC(rl_minima, PLAIN, FALLING_DIAGONAL, "lr_minima",
          "elements smaller than all that stand to their right", "O(n)", "definition")
STATISTIC(cycles, PLAIN, DIAGONALS, NULL,
          "cycles of the permutation as a map, fixed points included", "O(n)", "definition")
STATISTIC(longest_increasing, PLAIN, DIAGONALS, "longest_decreasing",
          "length of the longest increasing subsequence", "O(n log n)",
          "C. Schensted, Longest increasing and decreasing subsequences, Canadian Journal of "
          "Mathematics 13 (1961)")
STATISTIC(longest_decreasing, PLAIN, DIAGONALS, "longest_increasing",
          "length of the longest decreasing subsequence", "O(n log n)", "as longest_increasing")
STATISTIC(sum_components, PLAIN, DIAGONALS, "skew_components",
          "parts of the finest way to write it as a direct sum", "O(n)", "definition")
STATISTIC(skew_components, PLAIN, DIAGONALS, "sum_components",
          "parts of the finest way to write it as a skew sum", "O(n)", "definition")
STATISTIC(layers, PLAIN, DIAGONALS, NULL,
          "layers, where it is layered (a direct sum of decreasing runs), else 0", "O(n)",
          "definition")
STATISTIC(interior_layers, PLAIN, ALL, "interior_layers",
          "layers of size >= 2, neither first nor last, of it or its reverse where layered, else 0",
          "O(n)", "definition")
STATISTIC(proper_intervals, PLAIN, ALL, "proper_intervals",
          "intervals (runs of positions with a run of values) of 2 to n-1 elements", "O(n log n)",
          "definition; positions swept from left to right over a segment tree")
STATISTIC(intervals, SIZE, ALL, "intervals", "intervals of K elements", "O(n)",
          "definition; extremes of a sliding window")
STATISTIC(staircases, PLAIN, ALL, "staircases",
          "intervals whose pattern is a staircase, rising ones and falling ones added up", "O(n)",
          "docs/two-insertions.md; what two insertions give less than the ceiling")
STATISTIC(staircase_weight, PLAIN, ALL, "staircase_weight",
          "the weights e + h of the staircases added up", "O(n)", "docs/three-insertions.md")
STATISTIC(knights, PLAIN, ALL, "knights",
          "neighbouring values two positions apart, and neighbouring positions two values apart",
          "O(n)", "definition")
STATISTIC(triple_couplings, PLAIN, ALL, "triple_couplings",
          "canonical triple couplings, where three insertions meet and no two of them",
          "nearly O(n) on the families tried", "docs/three-insertions.md")
STATISTIC(occ, PATTERN, ONE, "occ", "occurrences of P: subsequences in the same relative order",
          "O(n log n) up to length 2, else a search of up to n^k steps, k the length of P",
          "definition")
STATISTIC(interval, PATTERN, ONE, "interval", "intervals whose pattern is P", "O(n)",
          "D. Knuth, J. Morris, V. Pratt, Fast pattern matching in strings, SIAM Journal on "
          "Computing 6 (1977), on the steps between neighbours")
STATISTIC(corners, PLAIN, ALL, "corners",
          "corners of the square that hold an element (the sum of the four below)", "O(1)",
          "definition")
STATISTIC(corner_bottom_left, PLAIN, RISING_DIAGONAL, "corner_bottom_right",
          "1 if the first element is 1, else 0", "O(1)", "definition")
STATISTIC(corner_top_left, PLAIN, FALLING_DIAGONAL, "corner_top_right",
          "1 if the first element is n, else 0", "O(1)", "definition")
STATISTIC(corner_bottom_right, PLAIN, FALLING_DIAGONAL, "corner_bottom_left",
          "1 if the last element is 1, else 0", "O(1)", "definition")
STATISTIC(corner_top_right, PLAIN, RISING_DIAGONAL, "corner_top_left",
          "1 if the last element is n, else 0", "O(1)", "definition")
STATISTIC(borders, PLAIN, ALL, "borders",
          "borders of the square at which a bond lies (the sum of the four below)", "O(n)",
          "definition")
STATISTIC(border_left, PLAIN, UP_DOWN, "border_right",
          "1 if the first two elements are a bond, else 0", "O(1)", "definition")
STATISTIC(border_right, PLAIN, UP_DOWN, "border_left",
          "1 if the last two elements are a bond, else 0", "O(1)", "definition")
STATISTIC(border_bottom, PLAIN, LEFT_RIGHT, "border_bottom",
          "1 if the elements 1 and 2 are a bond, else 0", "O(n)", "definition")
STATISTIC(border_top, PLAIN, LEFT_RIGHT, "border_top",
          "1 if the elements n-1 and n are a bond, else 0", "O(n)", "definition")

#undef ALL
#undef ONE
#undef HALF_TURN
#undef DIAGONALS
#undef RISING_DIAGONAL
#undef FALLING_DIAGONAL
#undef LEFT_RIGHT
#undef UP_DOWN
