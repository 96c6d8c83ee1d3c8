"""The language of expressions.

In: the text of an expression and what its names stand for.
Out: a node of an expression graph with its unit, its derivatives, or an error with its offset.
Must not know: models, files, how anything is computed.
"""
