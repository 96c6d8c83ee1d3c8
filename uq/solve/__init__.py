"""The solve room: code, inputs and times become solved members.

In: `Code`, x [member, input], times, settings. Out: `Batch` (values, conditions, outcomes, statuses, counts).
Must not know: distributions, blocks and rounds, dask, files.
"""
