"""The invented footbridges that come with the program."""

from __future__ import annotations

from importlib.resources import files
from importlib.resources.abc import Traversable
from pathlib import Path

from inspector.exchange import site
from inspector.exchange.site import Site
from models.errors import InputError, Problem

_SUFFIX = ".json"


def _folder() -> Traversable:
    """Where the samples lie: installed as data, or, in a checkout that is not installed, beside the packages."""
    try:
        return files("inspector.data")
    except ModuleNotFoundError:
        return Path(__file__).parents[1] / "sample_sites"


def names() -> tuple[str, ...]:
    """The samples, in alphabetical order."""
    found = (entry.name for entry in _folder().iterdir())
    return tuple(sorted(name.removesuffix(_SUFFIX) for name in found if name.endswith(_SUFFIX)))


def sample(name: str) -> Site:
    """One sample by its name.

    Raises
    ------
    InputError
        If there is no such sample; names those that there are.
    """
    if name not in names():
        raise InputError([Problem(name, "no such sample", f"one of {', '.join(names())}")])
    return site.read(_folder().joinpath(name + _SUFFIX).read_bytes(), name)
