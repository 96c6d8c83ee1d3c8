"""In: the text of a study file and the data files it names. Out: a `Study`, or every mistake in it with its place.
Must not know: how anything is computed.
"""
