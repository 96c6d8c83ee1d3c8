"""Turns a model's text into machine code for the processor at hand.

In: `Code`. Out: `Compiled` (addresses of its functions; owns the memory that they lie in). Must not know: what the functions compute.
This is the only door to llvmlite. Nothing here sets a fast-math flag or lets multiplications and additions be joined.
"""

from __future__ import annotations

import platform
import threading
from dataclasses import dataclass
from functools import cache, lru_cache
from typing import Any

from uq.errors import UqError
from uq.model.code import Code
from uq.model.layout import Layout

FUNCTIONS = ("uq_start", "uq_rates", "uq_step", "uq_stiff", "uq_observe", "uq_outcomes", "uq_starts")
# The widest vectors of a processor, by the feature that LLVM knows them by.
WIDTHS = (("avx512f", "avx512"), ("avx2", "avx2"), ("sve", "sve"), ("neon", "neon"))
NO_FMA = (
    "this processor has no fused multiply-add (FMA) instruction, which uq needs: "
    "x86 processors since about 2013 and all 64-bit ARM processors have it"
)
# The text is already in the shape that an optimiser would bring it to. Measured: passes over it doubled the time and made code no faster,
# and of the code generator's levels 1 is as good as 2 in half the time, 0 up to three times slower on AVX2.
LEVEL = 1

# Enough for a few studies side by side; what a caller holds stays alive whatever is forgotten here.
REMEMBERED = 32
_lock = threading.Lock()


@dataclass(frozen=True, eq=False)
class Compiled:
    """A model ready to be called: its code, its slots, the address of every function (0 where the model has none).

    Owns the engine in which the machine code lies: keep it as long as an address may be called.
    """

    code: Code
    layout: Layout
    addresses: dict[str, int]
    engine: Any


@dataclass(frozen=True)
class Processor:
    """What code is made for: name and features as LLVM calls them."""

    name: str
    features: str

    @property
    def words(self) -> str:
        """What a reader of a result needs to know of it, such as "x86_64, znver4, avx512"."""
        machine = platform.machine() or "unknown"
        width = next((said for feature, said in WIDTHS if f"+{feature}" in self.features.split(",")), "")
        return ", ".join(part for part in (machine, self.name, width) if part)

    @classmethod
    def here(cls) -> Processor:
        """The processor that this runs on; UqError if it lacks FMA."""
        import llvmlite.binding as llvm

        features = llvm.get_host_cpu_features()
        arm = llvm.get_process_triple().startswith(("aarch64", "arm64"))
        if not arm and not features.get("fma", False):
            raise UqError(NO_FMA)
        return cls(llvm.get_host_cpu_name(), features.flatten())


def compile_code(code: Code) -> Compiled:
    """Machine code for the processor at hand; the same code is compiled once in a process.

    UqError if the processor lacks FMA. Any other error is a defect of ours.
    """
    with _lock:  # so that threads that ask together do not compile the same
        return _remembered(code)


@lru_cache(REMEMBERED)
def _remembered(code: Code) -> Compiled:
    return compile_for(code, Processor.here())


def compile_for(code: Code, processor: Processor) -> Compiled:
    """Machine code for a given processor, which must be able to run here; not remembered."""
    import llvmlite.binding as llvm

    module, machine = parsed(code.text, processor)
    engine = llvm.create_mcjit_compiler(module, machine)
    engine.finalize_object()
    addresses = {name: engine.get_function_address(name) if f"@{name}(" in code.text else 0 for name in FUNCTIONS}
    return Compiled(code, code.layout, addresses, engine)


def machine_text(code: Code, processor: Processor) -> str:
    """The assembly text of a model, for reading and for tests."""
    module, machine = parsed(code.text, processor)
    return str(machine.emit_assembly(module))


def parsed(text: str, processor: Processor) -> tuple[Any, Any]:
    """The verified module and the machine that code is to be made for."""
    import llvmlite.binding as llvm

    _initialise()
    target = llvm.Target.from_triple(llvm.get_process_triple())
    machine = target.create_target_machine(cpu=processor.name, features=processor.features, opt=LEVEL, jit=True)
    module = llvm.parse_assembly(text)
    module.triple = llvm.get_process_triple()
    module.data_layout = str(machine.target_data)
    module.verify()
    return module, machine


@cache
def _initialise() -> None:
    """Start the code generator of this processor, once."""
    import llvmlite.binding as llvm

    llvm.initialize_native_target()
    llvm.initialize_native_asmprinter()
