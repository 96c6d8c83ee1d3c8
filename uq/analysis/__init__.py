"""Solved members into answers with intervals; one module per question.

In: an `Ask` and `Sample`s of solved blocks. Out: `Tallies` that merge in any order, and `Finding`s under their public names.
Must not know: files, plots, how members are solved, how blocks are scheduled.
"""
