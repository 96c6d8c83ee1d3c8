"""In: names of functions. Out: LLVM text that defines them on eight doubles, at most 2 units in the last place from the truth.

Must not know: models, expressions, processors; nothing here imports a compiler.
"""
