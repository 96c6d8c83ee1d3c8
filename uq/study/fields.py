"""What makes a class a declaration: its fields are the TOML keys, each with a one-line meaning and a reader.

In: a table as tomllib gave it. Out: the declaration, or every mistake in it. Must not know: which declarations there are.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import MISSING, dataclass, field, fields, replace
from typing import Any, Generic, TypeVar

from uq.errors import ValueMistake, suggest
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Refused
from uq.study.values import Frame, Reader, show
from uq.units import Unit

T = TypeVar("T")

NOT_YET = "which is not available yet"


def entry(meaning: str, read: Reader, default: Any = MISSING, shown: str = "") -> Any:
    """A field that is a TOML key; without `default` it must be there. `shown` words the default in the key tables."""
    return field(default=default, metadata={"meaning": meaning, "read": read, "shown": shown})


def unit_entry(meaning: str, read: Reader) -> Any:
    """The key `unit`: must be there unless the study states no unit anywhere."""
    return field(default="1", metadata={"meaning": meaning, "read": read, "shown": "needed", "needed": True})


def one_of(meaning: str, read: Reader, keys: tuple[str, ...]) -> Any:
    """A field that is filled by any one of several TOML keys; `read` gets the table of those which are there."""
    return field(default=None, metadata={"meaning": meaning, "read": read, "shown": "", "keys": keys})


@dataclass(frozen=True)
class Sheet(Generic[T]):
    """A table as far as it could be read: the values by field, the mistakes by path below it, the declaration if there are none.

    `unit` is that of the table, None where it has none or a wrong one.
    """

    values: Mapping[str, Any]
    mistakes: tuple[tuple[Path, ValueMistake], ...]
    whole: T | None
    unit: Unit | None = None

    def refused(self, *mistakes: tuple[Path, ValueMistake]) -> Sheet[T]:
        """The same with more mistakes, and so without a declaration."""
        return replace(self, mistakes=(*self.mistakes, *mistakes), whole=None)


def refuse(mistakes: Iterable[tuple[Path, ValueMistake]]) -> None:
    """Raise what a declaration finds wrong with itself, if anything."""
    found = tuple(mistakes)
    if found:
        raise Refused(found)


def keys_of(declaration: type[Any]) -> tuple[str, ...]:
    """The TOML keys of a declaration that this version reads."""
    keys: list[str] = []
    for item in fields(declaration):
        if "meaning" in item.metadata:
            keys += item.metadata.get("keys", (item.name,))
    return tuple(keys)


def later_keys(declaration: type[Any]) -> tuple[str, ...]:
    """The TOML keys of a declaration that the format knows and this version does not."""
    return tuple(getattr(declaration, "later", ()))


def read_table(declaration: type[T], table: object, frame: Frame, name: str = "") -> Sheet[T]:
    """Read one table by the fields of its declaration; numbers are read in the table's own unit where it has one."""
    if not isinstance(table, Mapping):
        return Sheet({}, (((), ValueMistake(show(table), "a table")),), None)
    known = keys_of(declaration)
    mistakes: list[tuple[Path, ValueMistake]] = []
    mistakes += [((key,), unknown(key, known, later_keys(declaration))) for key in table if key not in known]
    values: dict[str, Any] = {"name": name} if "name" in declaration.__dataclass_fields__ else {}  # type: ignore[attr-defined]
    # A key that cannot be read may have been meant as one that is missing: one slip gives one message.
    meant = {mistake.remedy for _, mistake in mistakes}
    waits = any(key in later_keys(declaration) for key in table)
    own: Unit | None = None
    for item in fields(declaration):  # type: ignore[arg-type]
        if "meaning" in item.metadata:
            found = _read_field(item, table, values, frame)
            missing = item.name not in table and "keys" not in item.metadata
            mistakes += [] if missing and (waits or f"did you mean `{item.name}`?" in meant) else found
            if item.name == "unit":
                own = frame.unit_of(values["unit"]) if values.get("unit") else None
                frame = frame.within(own) if item.metadata.get("needed") else frame
    if mistakes:
        return Sheet(values, tuple(mistakes), None, own)
    try:
        return Sheet(values, (), declaration(**values), own)
    except ValueMistake as mistake:
        return Sheet(values, (((), mistake),), None, own)
    except Refused as refused:
        return Sheet(values, refused.mistakes, None, own)


def read_part(declaration: type[Any]) -> Reader:
    """The reader of a table within a table."""

    def read(value: object, frame: Frame) -> Any:
        sheet = read_table(declaration, value, frame)
        if sheet.whole is None:
            raise Refused(sheet.mistakes)
        return sheet.whole

    return read


def _read_field(item: Any, table: Mapping[str, Any], values: dict[str, Any], frame: Frame) -> list[tuple[Path, ValueMistake]]:
    """One field into `values`; what is wrong with it."""
    several = item.metadata.get("keys")
    if several:
        given: Any = {key: table[key] for key in table if key in several}
        path: Path = ()
        if not given:
            return []
    elif item.name in table:
        given, path = table[item.name], (item.name,)
    elif item.metadata.get("needed"):
        if frame.unitless:
            values[item.name] = item.default
            return []
        return [((item.name,), KeyMistake("no unit", 'a unit, unit = "..." ("1" for none)'))]
    elif item.default is MISSING:
        return [((item.name,), KeyMistake(f"no `{item.name}`", f"a key `{item.name}`, {item.metadata['meaning']}"))]
    else:
        return []
    try:
        values[item.name] = item.metadata["read"](given, frame)
    except ValueMistake as mistake:
        return [(path, mistake)]
    except Refused as refused:
        return [((*path, *below), mistake) for below, mistake in refused.mistakes]
    return []


def unknown(key: str, known: Iterable[str], later: Iterable[str]) -> KeyMistake:
    """What is said of a key that cannot be read."""
    if key in later:
        return KeyMistake(f"`{key}`, {NOT_YET}", "a study without it for now")
    words = ", ".join(known)
    return KeyMistake(f"the unknown key `{key}`", f"one of {words}" if words else "no key here", suggest(key, [*known, *later]))
