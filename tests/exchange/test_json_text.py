"""Strict JSON: what lenient readers let through is refused, at its place."""

from __future__ import annotations

import contextlib
import json

import pytest
from hypothesis import given
from hypothesis import strategies as st

from inspector.exchange import json_text
from models.errors import InputError

SCALARS = st.none() | st.booleans() | st.integers(-(2**60), 2**60) | st.floats(allow_nan=False, allow_infinity=False)
VALUES = st.recursive(
    SCALARS | st.text(st.characters(codec="utf-8")),
    lambda inner: (
        st.lists(inner, max_size=4) | st.dictionaries(st.text(st.characters(codec="utf-8")), inner, max_size=4)
    ),
    max_leaves=20,
)


def paths(text: str | bytes) -> list[str]:
    """Where the problems of a text stand."""
    with pytest.raises(InputError) as caught:
        json_text.parse(text)
    return [problem.path for problem in caught.value.problems]


@given(VALUES)
def test_reads_what_any_reader_reads(value: object) -> None:
    """On a document without tricks the strict reader agrees with the standard one."""
    assert json_text.parse(json.dumps(value)) == value


@given(VALUES)
def test_canonical_text_reads_back(value: object) -> None:
    """Nothing is lost in the canonical text, and making it twice changes nothing."""
    text = json_text.canonical_json(value)
    assert json_text.parse(text) == value
    assert json_text.canonical_json(json_text.parse(text)) == text


@given(st.binary(max_size=60) | st.text(alphabet='[]{}":,\\0123456789.eE+-truefalsn \ufeff\ud800', max_size=40))
def test_never_anything_but_a_document_or_an_input_error(data: bytes | str) -> None:
    """Whatever the bytes, there is a document or an error that the program raises on purpose."""
    with contextlib.suppress(InputError):
        json_text.parse(data)


def test_all_places_in_order() -> None:
    """Keys given twice and unusable numbers are named all at once, in the order of the file."""
    assert paths('{"a": {"x": 1, "x": 2}, "b": [0, NaN, {"c": 1e400}], "d": -Infinity}') == ["a/x", "b/1", "b/2/c", "d"]


def test_whole_number_of_thousands_of_digits() -> None:
    """A whole number that Python refuses to read is a problem at its place."""
    assert paths('[1, {"n": ' + "9" * 5000 + "}]") == ["1/n"]


def test_half_character_in_a_key() -> None:
    """A key that no UTF-8 file can hold is a problem, and its path can be printed."""
    assert [path.encode() for path in paths('{"\\ud800x": 1}')] == ["\ufffdx".encode()]


@pytest.mark.parametrize("deepest", [50])
def test_levels(deepest: int) -> None:
    """Fifty levels are read, one more is not; brackets inside texts do not count."""
    assert json_text.parse("[" * deepest + '"[[[[{{{{"' + "]" * deepest)
    assert paths("[" * (deepest + 1) + "]" * (deepest + 1)) == [""]


def test_quotes_without_end_take_no_time() -> None:
    """A long text of escaped quotes that never ends is refused without looking at each place again."""
    assert paths('"' + '\\"' * 200_000) == [""]
