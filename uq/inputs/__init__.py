"""What is uncertain, as distributions.

In: the arguments of a distribution; points u in the open unit cube. Out: a distribution that has checked itself, or every mistake in it; x.
Must not know: designs, models, files.
"""
