"""In: findings, and the facts of the run they come from. Out: the run folder and its result.nc, and both read back.
Must not know: how a number was made.
"""
