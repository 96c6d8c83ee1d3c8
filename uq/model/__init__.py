"""The model room: declared equations become machine code as text.

In: `Equations` (nodes of one expression graph). Out: `Code` (LLVM text, names, sizes).
Must not know: distributions, solvers' control flow, compilers, files.
"""
