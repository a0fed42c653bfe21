"""Values to columns and back, led by the fields of the frozen values themselves.

A scalar is a column of the field's name, a quantity two (``_text`` and ``_si``), anything else plain
JSON. A field without its column is a failing test, not a silent loss.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import fields, is_dataclass
from functools import cache
from types import NoneType, UnionType
from typing import Any, Literal, TypeVar, Union, get_args, get_origin, get_type_hints

from inspector.store.errors import StoreError
from models.quantity import Quantity

Value = TypeVar("Value")

_SCALARS = (str, int, float, bool)


def spread(value: object, *, without: tuple[str, ...] = ()) -> dict[str, Any]:
    """The columns that hold a frozen value; the fields ``without`` are stored elsewhere.

    Raises
    ------
    StoreError
        If a number is not finite: no file could hold it.
    """
    columns: dict[str, Any] = {}
    kind: Any = type(value)
    for name, hint in _hints(kind).items():
        if name in without:
            continue
        part = getattr(value, name)
        if Quantity in _arms(hint):
            columns[f"{name}_text"] = None if part is None else part.text
            columns[f"{name}_si"] = None if part is None else plain(part.si)
        else:
            columns[name] = plain(part)
    return columns


def gather(kind: Callable[..., Value], row: object, **given: object) -> Value:
    """The frozen value of this kind that the columns of a row hold; ``given`` holds the other fields."""
    parts: dict[str, Any] = dict(given)
    for name, hint in _hints(kind).items():
        if name in given:
            continue
        if Quantity in _arms(hint):
            parts[name] = quantity(row, name)
        else:
            parts[name] = revive(getattr(row, name), hint)
    return kind(**parts)


def quantity(row: object, name: str) -> Quantity | None:
    """The quantity in the two columns of this name."""
    text = getattr(row, f"{name}_text")
    return None if text is None else Quantity(text, getattr(row, f"{name}_si"))


def plain(value: Any) -> Any:
    """A frozen value as JSON has it: objects, lists and scalars. What a value does not say is left out."""
    if isinstance(value, float) and not math.isfinite(value):
        raise StoreError(f"{value} cannot be stored: a number has to be finite. Nothing was stored.")
    if value is None or isinstance(value, _SCALARS):
        return value
    if isinstance(value, Mapping):
        return {key: plain(part) for key, part in value.items()}
    if isinstance(value, frozenset):
        return sorted(value)
    if isinstance(value, tuple | list):
        return [plain(part) for part in value]
    named = ((field.name, getattr(value, field.name)) for field in fields(value))
    return {name: plain(part) for name, part in named if part is not None}


def revive(value: Any, hint: Any) -> Any:
    """The frozen value of the hinted type that a plain one stands for; the inverse of `plain`."""
    if isinstance(value, dict):
        return _revive_object(value, hint)
    if isinstance(value, list):
        return _revive_list(value, hint)
    return value


def _revive_object(value: dict[str, Any], hint: Any) -> Any:
    for arm in _arms(hint):
        if is_dataclass(arm) and isinstance(arm, type):
            hints = _hints(arm)
            return arm(**{name: revive(part, hints[name]) for name, part in value.items()})
        if get_origin(arm) is Mapping:
            return {name: revive(part, get_args(arm)[1]) for name, part in value.items()}
    return value


def _revive_list(value: list[Any], hint: Any) -> Any:
    for arm in _arms(hint):
        if get_origin(arm) is frozenset:
            return frozenset(value)
        if get_origin(arm) is tuple:
            return tuple(revive(part, get_args(arm)[0]) for part in value)
    return value


@cache
def _hints(kind: Any) -> dict[str, Any]:
    hints = get_type_hints(kind)
    return {field.name: hints[field.name] for field in fields(kind)}


def _arms(hint: Any) -> tuple[Any, ...]:
    """The types that a hint allows, None left out."""
    if get_origin(hint) in {Union, UnionType}:
        return tuple(arm for arm in get_args(hint) if arm is not NoneType)
    return () if get_origin(hint) is Literal else (hint,)
