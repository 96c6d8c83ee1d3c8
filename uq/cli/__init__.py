"""The command `uq`: arguments in, one call, words and an exit code out.

In: arguments, environment, signals. Out: results on standard output, messages on standard error, an exit code. Must not know: how anything
is computed.
"""
