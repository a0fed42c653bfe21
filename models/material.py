"""Strengths of the metals of a bridge, and what stands in where the site does not give them."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

from models.bridge import Material
from models.errors import InputError, Problem
from models.quantity import parse

KINDS: Final = ("structural steel", "wrought iron", "stainless steel")

FU_OVER_FY: Final = 1.2
"""Greatest tensile strength over yield strength that is assumed where only the yield strength is given
(common practice, no source)."""

_STEEL_SOURCE: Final = "AASHTO Manual for Bridge Evaluation, Table 6A.6.2.1-1, from memory"
_IRON_SOURCE: Final = "AASHTO Manual for Bridge Evaluation 6A.6.2, from memory"
_KSI: Final = parse("1 ksi", "stress").si


@dataclass(frozen=True, slots=True)
class Strengths:
    """Yield and tensile strength, Pa, with a sentence for each that was assumed."""

    Fy: float
    Fu: float
    assumptions: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class _Class:
    """Strengths, ksi, of metal of unknown grade; ``last`` year that it holds for, None for no end."""

    last: int | None
    Fy: float
    Fu: float
    about: str
    source: str = _STEEL_SOURCE


_STEELS: Final = (
    _Class(1905, 26, 52, "steel made before 1905"),
    _Class(1936, 30, 60, "steel made from 1905 to 1936"),
    _Class(1963, 33, 66, "steel made from 1936 to 1963"),
    _Class(None, 36, 66, "steel made after 1963"),
)
"""A boundary year takes the lower class."""

_UNDATED_STEEL: Final = _Class(None, 26, 52, "steel of unknown year, as if made before 1905")
_IRON: Final = _Class(None, 26, 48, "wrought iron", _IRON_SOURCE)


def faults(material: Material) -> tuple[Problem, ...]:
    """What is wrong with a material; paths are relative to it."""
    found = [
        Problem(key, f"`{value.text}` cannot be a property of a metal", "more than zero")
        for key, value in (("E", material.E), ("density", material.density), ("Fy", material.Fy), ("Fu", material.Fu))
        if value is not None and value.si <= 0
    ]
    if material.kind not in KINDS:
        found.append(Problem("kind", f"`{material.kind}` is not a kind of metal", "one of " + ", ".join(KINDS)))
    if material.kind == "stainless steel":
        found.extend(
            Problem(
                key, f"stainless steel `{material.name}` has no `{key}`, and nothing can stand in for it", "a stress"
            )
            for key, value in (("Fy", material.Fy), ("Fu", material.Fu))
            if value is None
        )
    return tuple(found)


def strengths(material: Material, built: int | None) -> Strengths:
    """Settle the strengths of a metal.

    Parameters
    ----------
    built : year in which the bridge was built, if known.

    Raises
    ------
    InputError
        If the kind is unknown, or stainless steel lacks a strength; paths from the top of the site file.

    References
    ----------
    AASHTO Manual for Bridge Evaluation 6A.6.2 (from memory).
    """
    wrong = faults(material)
    if wrong:
        raise InputError(
            Problem(f"materials/{material.name}/{problem.path}", problem.what, problem.expected) for problem in wrong
        )
    if material.Fy and material.Fu:
        return Strengths(material.Fy.si, material.Fu.si)
    unknown = _class_of(material.kind, built)
    Fy, yield_said = _yield_strength(material, unknown)
    Fu, tensile_said = _tensile_strength(material, unknown)
    return Strengths(Fy, Fu, (*yield_said, *tensile_said))


def _class_of(kind: str, built: int | None) -> _Class:
    if kind == "wrought iron":
        return _IRON
    if built is None:
        return _UNDATED_STEEL
    return next(steel for steel in _STEELS if steel.last is None or built <= steel.last)


def _yield_strength(material: Material, unknown: _Class) -> tuple[float, tuple[str, ...]]:
    if material.Fy:
        return material.Fy.si, ()
    default = unknown.Fy * _KSI
    if material.Fu and material.Fu.si < default:
        why = f"the tensile strength that is given, below the Fy of {unknown.about} ({unknown.source})"
        return material.Fu.si, (_said(material, "yield strength", "Fy", material.Fu.si, why),)
    return default, (_said(material, "yield strength", "Fy", default, f"that of {unknown.about} ({unknown.source})"),)


def _tensile_strength(material: Material, unknown: _Class) -> tuple[float, tuple[str, ...]]:
    if material.Fu:
        return material.Fu.si, ()
    default = unknown.Fu * _KSI
    bound = FU_OVER_FY * material.Fy.si if material.Fy else default
    if bound < default:
        why = f"{FU_OVER_FY} times the yield strength that is given (common practice, no source)"
        return bound, (_said(material, "tensile strength", "Fu", bound, why),)
    return default, (_said(material, "tensile strength", "Fu", default, f"that of {unknown.about} ({unknown.source})"),)


def _said(material: Material, what: str, symbol: str, stress: float, why: str) -> str:
    """In both units: the tables are in ksi, most readers think in MPa."""
    both = f"{stress / 1e6:.0f} MPa ({stress / _KSI:.3g} ksi)"
    return f"Material `{material.name}`: the site gives no {what}; {symbol} {both} is assumed, {why}."
