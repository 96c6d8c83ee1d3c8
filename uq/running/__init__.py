"""Rounds of blocks, spread over threads and folded into tallies.

In: compiled code, inputs, a design, what is asked. Out: tallies of every replicate, counts, progress.
Must not know: reports, the queue, files.
"""
