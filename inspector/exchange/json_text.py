"""Strict reading of JSON, and the one way of writing it that a hash can rest on.

RFC 8259, and stricter where readers differ: no key twice, no NaN or Infinity, no number beyond a double, no half
of a character, UTF-8 alone. Everything that is wrong comes as an `InputError`.
"""

from __future__ import annotations

import json
import math
import re
from collections import Counter
from collections.abc import Iterator
from typing import Any, Final, NoReturn, Self

from inspector.exchange.form import LARGEST_WHOLE, Json, join
from models.errors import InputError, Problem

LARGEST: Final = 20_000_000
"""Bytes in a file."""

DEEPEST: Final = 50
"""Levels of lists and objects within each other."""

_BOM: Final = b"\xef\xbb\xbf"
_OTHER_BOMS: Final = (b"\xff\xfe", b"\xfe\xff")
_BRACKETS: Final = re.compile(r'"[^"\\]*+(?:\\.[^"\\]*+)*+"?|[\[\]{}]', re.DOTALL)
# An unclosed text is swallowed to the end of the file, so that no place is looked at twice.
_HALF: Final = re.compile("[\ud800-\udfff]")


class _Unusable(float):
    """A number of a file that no double holds, with its text."""

    text: str

    def __new__(cls, text: str) -> Self:
        made = super().__new__(cls, "nan")
        made.text = text
        return made


class _Object(dict[str, Any]):
    """An object of a file, with the keys that it gave more than once."""

    twice: tuple[str, ...] = ()


def parse(data: bytes | str, source: str = "") -> Json:
    """Read a JSON document strictly.

    Parameters
    ----------
    data : UTF-8 with or without byte order mark, or text.
    source : where it comes from, for the error.

    Raises
    ------
    InputError
        With all keys given twice and all unusable numbers and texts; or with the first thing that is not JSON.
    """
    text = _decoded(data, source)
    _check_levels(text, source)
    try:
        document = json.loads(
            text, object_pairs_hook=_object, parse_float=_float, parse_int=_int, parse_constant=_Unusable
        )
    except json.JSONDecodeError as error:
        what = error.msg[0].lower() + error.msg[1:].removesuffix(" starting at")
        _refuse(f"this is not JSON at line {error.lineno}, column {error.colno}: {what}", "a JSON document", source)
    problems = list(unusable(document))
    if problems:
        raise InputError(problems, source)
    return document


def unusable(document: Json) -> Iterator[Problem]:
    """Keys given twice, numbers that are not finite and texts that are not Unicode, each with its path."""
    waiting: list[tuple[str, Json]] = [("", document)]
    while waiting:
        path, value = waiting.pop()
        if isinstance(value, float) and not math.isfinite(value):
            text = value.text if isinstance(value, _Unusable) else str(value)
            yield Problem(path, f"`{text[:40]}` is not a number that a computer can hold", "a finite number")
        elif isinstance(value, str):
            yield from _half(path, value)
        elif isinstance(value, list | tuple):
            waiting += [(join(path, index), item) for index, item in enumerate(value)][::-1]
        elif isinstance(value, dict):
            twice = value.twice if isinstance(value, _Object) else ()
            yield from (
                Problem(join(path, _safe(key)), f"the key `{_safe(key)}` is given twice", "it once") for key in twice
            )
            for key in value:
                yield from _half(join(path, _safe(key)), key)
            waiting += [(join(path, _safe(key)), item) for key, item in value.items()][::-1]


def canonical_json(document: Json) -> bytes:
    """The one text that stands for a document.

    UTF-8, keys sorted by their characters, no spaces, numbers as the shortest text that reads back the same: a
    whole number has no decimal point however it was typed, as JSON knows no difference between 1 and 1.0.
    """
    plain = _plain(document)
    return json.dumps(plain, ensure_ascii=False, sort_keys=True, separators=(",", ":"), allow_nan=False).encode()


def _plain(value: Json) -> Json:
    if isinstance(value, dict):
        return {key: _plain(item) for key, item in value.items()}
    if isinstance(value, list):
        return [_plain(item) for item in value]
    if isinstance(value, float) and abs(value) <= LARGEST_WHOLE and value.is_integer():
        return int(value)
    return value


def _decoded(data: bytes | str, source: str) -> str:
    size = len(data) if isinstance(data, bytes) else len(data.encode("utf-8", "surrogatepass"))
    if size > LARGEST:
        _refuse(f"the file has {size} bytes", f"at most {LARGEST}", source)
    if isinstance(data, bytes):
        if data.startswith(_OTHER_BOMS):
            _refuse("the file is in UTF-16", "UTF-8; save it again as UTF-8", source)
        try:
            data = data.removeprefix(_BOM).decode("utf-8")
        except UnicodeDecodeError as error:
            _refuse(f"byte {error.start} of the file is not UTF-8 text", "a JSON document in UTF-8", source)
    data = data.removeprefix("\ufeff")
    if not data.strip():
        _refuse("the file is empty", "a JSON document", source)
    return data


def _check_levels(text: str, source: str) -> None:
    level = 0
    for match in _BRACKETS.finditer(text):
        bracket = match[0]
        if bracket in ("[", "{"):
            level += 1
        elif bracket in ("]", "}"):
            level -= 1
        if level > DEEPEST:
            line = text.count("\n", 0, match.start()) + 1
            _refuse(
                f"lists and objects stand more than {DEEPEST} deep at line {line}", f"at most {DEEPEST} levels", source
            )


def _object(pairs: list[tuple[str, Any]]) -> _Object:
    made = _Object(pairs)
    if len(made) < len(pairs):
        counts = Counter(name for name, _ in pairs)
        made.twice = tuple(name for name, count in counts.items() if count > 1)
    return made


def _float(text: str) -> float:
    value = float(text)
    return value if math.isfinite(value) else _Unusable(text)


def _int(text: str) -> int | float:
    # Python refuses whole numbers of several thousand digits with a bare error, and a double ends at 309.
    return int(text) if len(text) < 300 else _Unusable(text)


def _half(path: str, text: str) -> Iterator[Problem]:
    if _HALF.search(text):
        yield Problem(path, "the text holds half of a character (a lone surrogate)", "whole Unicode characters")


def _safe(text: str) -> str:
    return _HALF.sub("\ufffd", text)


def _refuse(what: str, expected: str, source: str) -> NoReturn:
    raise InputError([Problem("", what, expected)], source)
