"""In: a result as it lies in its file, or a study that is not run yet. Out: text and the machine form of the same.
Must not know: how a number was made, nor where the text goes.
"""
