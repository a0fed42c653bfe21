"""The invented footbridges that come with the program."""

from __future__ import annotations

from importlib.resources import files

from inspector.exchange import site
from inspector.exchange.site import Site
from models.errors import InputError, Problem

_SUFFIX = ".json"


def names() -> tuple[str, ...]:
    """The samples, in alphabetical order."""
    found = (entry.name for entry in files("inspector.data").iterdir())
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
    return site.read(files("inspector.data").joinpath(name + _SUFFIX).read_bytes(), name)
