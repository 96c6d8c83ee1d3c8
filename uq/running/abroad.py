"""What runs in processes that may hold other versions than ours. It travels by value: nothing of it is looked up where it arrives.

A function within a function is pickled by value, with nothing of this file but what it names; each imports what it needs when it is called.
Neither a scheduler nor a worker of somebody else's has to have this package in order to receive it.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import Any

Made = dict[str, str]
# What a worker answers that is not fit for a task.
REFUSED = "refused"


def asking(version: str) -> Callable[[], Made]:
    """What a worker answers when it is asked what it works with: everything, where it has this version of uq."""

    def told() -> Made:
        try:
            import uq
        except ImportError:
            return {"uq": "not installed"}
        if uq.__version__ != version:
            return {"uq": uq.__version__}
        from uq.running.facts import made_with

        return made_with()

    return told


def carrier(parcels: Mapping[str, bytes], made: Made) -> Any:
    """A plugin that brings parcels, by fingerprint, to every worker there is and to those that come, before they get any task.

    A worker that does not work with the same as we (`made`) refuses our tasks. When the plugin is taken away, whatever is being solved for
    these parcels stops within a step.
    """
    from distributed import WorkerPlugin

    version, held, wanted = made["uq"], dict(parcels), dict(made)

    class Carrier(WorkerPlugin):  # type: ignore[misc]
        def setup(self, worker: Any) -> None:
            import numpy

            self.parcels, self.stop, self.fit = held, numpy.zeros(1, dtype=numpy.uint8), False
            try:
                import uq
            except ImportError:
                return
            if uq.__version__ == version:
                from uq.running.facts import made_with

                self.fit = made_with() == wanted

        def teardown(self, worker: Any) -> None:
            self.stop[0] = 1

    return Carrier()


def working(plugin: str) -> Callable[[str, tuple[Any, ...]], Any]:
    """What a worker does with a task: fingerprint of its parcel, and the task as a tuple."""
    refused = REFUSED

    def work(key: str, task: tuple[Any, ...]) -> Any:
        from distributed import get_worker

        carrier = get_worker().plugins.get(plugin)
        if carrier is None or not carrier.fit:
            return refused
        from uq.design.blocks import Block
        from uq.running.parcel import piloted_here, solved_here
        from uq.running.tasks import Task

        name, block, solves, more, pilot = task
        content, stop = carrier.parcels[key], carrier.stop
        if pilot:
            return piloted_here(key, content, stop)
        return solved_here(key, content, Task(name, Block(*block), solves, tuple(Block(*each) for each in more)), stop)

    return work


def strict(begin: str, deaths: int) -> Any:
    """A plugin for a scheduler of somebody else: tasks whose names begin so are given up when so many workers have died of them, however
    many that scheduler allows. All other tasks are left alone."""
    from distributed import SchedulerPlugin

    class Strict(SchedulerPlugin):  # type: ignore[misc]
        async def start(self, scheduler: Any) -> None:
            self.scheduler = scheduler

        def transition(self, key: Any, start: str, finish: str, *_: Any, **__: Any) -> None:
            if finish == "processing" and str(key).startswith(begin) and key in self.scheduler.tasks:
                task = self.scheduler.tasks[key]
                # It is given up when this is more than the scheduler allows.
                task.suspicious = max(task.suspicious, self.scheduler.allowed_failures + 1 - deaths)

    return Strict()


def unlike(made: Made, theirs: Made) -> str:
    """In what a worker differs from us, in words; "" where it does not."""
    names = [name for name in made if theirs.get(name, "") != made[name]] if theirs.get("uq") == made["uq"] else ["uq"]
    return ", ".join(f"{name} {theirs.get(name) or 'not installed'} (here {made[name]})" for name in names)
