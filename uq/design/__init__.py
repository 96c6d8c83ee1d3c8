"""Which points are drawn, and in which blocks.

In: the names of the inputs, a seed, how many rows. Out: points u in the open unit cube by blocks; results of a block taken apart again.
Must not know: distributions, models.
"""
