"""Sentences about what a rating found."""

from __future__ import annotations

import math

from models.words import count, factor, listed, significant


def severed(bar: str) -> str:
    """A bar is cut through."""
    return f"{bar} is severed; it carries nothing and all others are solved without it."


def no_steel_left(bar: str) -> str:
    """No plate is left somewhere along a bar."""
    return f"The readings on {bar} leave no steel at one place; it is treated as severed."


def cracked_out(bar: str) -> str:
    """A cracked bar in tension."""
    return (
        f"{bar} is cracked and pulled by the factored loads; it gets no credit until an engineer has assessed the "
        "crack. The figures are those without it."
    )


def cracked_in(bar: str) -> str:
    """A cracked bar that no factored load pulls."""
    return (
        f"{bar} is cracked; no factored load pulls it, so it stays in. What the crack does in compression is left out."
    )


def mechanism(truss: str, joints: tuple[str, ...], bars: tuple[str, ...], *, nearly: bool) -> str:
    """A truss that can move."""
    what = "is nearly a mechanism" if nearly else "is a mechanism: it has no equilibrium as a pin-jointed truss"
    loose = f" Bars between moving and still joints: {listed(bars)}." if bars else ""
    moving = f" {count(len(joints), 'joint moves', 'joints move')}: {listed(joints)}." if joints else ""
    return f"Truss {truss} {what}. There are no forces and no rating factors.{moving}{loose}"


def dead_exceeds(bar: str, direction: str, margin: str) -> str:
    """Dead load alone is more than a bar can carry."""
    what = f"what {bar} can carry in {direction}, by {margin}"
    return f"The factored dead load alone exceeds {what}; its rating factor is 0."


def below_trigger(bar: str, found: float, trigger: float) -> str:
    """The owner's trigger is met."""
    limit = f"the {factor(trigger)} at which the owner wants to be called"
    return f"{bar} has a rating factor of {factor(found)}, below {limit}."


def goes_slack(bar: str, governed: tuple[str, ...], of: int) -> str:
    """A bar that cannot push leaves the truss under some loads."""
    where = f"of {listed(governed)}" if len(governed) <= 3 else f"of {len(governed)} of the {of} bars"
    return f"{bar} can only pull. It goes slack under the loads that govern the rating factor {where}."


def panel_slack(rods: tuple[str, ...], governed: str) -> str:
    """No rod of a panel pulls."""
    return f"{listed(rods)} are all slack under the loads that govern {governed}."


def would_have_to_push(truss: str, bars: tuple[str, ...]) -> str:
    """Dead load has no equilibrium unless bars push that cannot."""
    return (
        f"Under its dead load truss {truss} would need a push from bars that can only pull ({listed(bars)}); without "
        "it there is no equilibrium."
    )


def equilibrium_ends(truss: str, at: float, load: str | None) -> str:
    """A live load can grow no further, whatever the bars bear."""
    what = f"{factor(at)} times the factored {load}" if load else "its factored dead load"
    return (
        f"Truss {truss} has no equilibrium beyond {what}, as bars would have to push that can only pull. That limits "
        "every bar whose own rating factor is higher; its check reads `equilibrium`."
    )


def not_decided(truss: str) -> str:
    """Some states could not be found."""
    return (
        f"Under some arrangements of load on truss {truss} it could not be decided which bars go slack; they are left "
        "out, so that the rating factors may be too high."
    )


def slender_plate(plates: tuple[str, ...], counted: float) -> str:
    """Thin plates in compression: how much of the section counts, rounded down."""
    verb = "is" if len(plates) == 1 else "are"
    return f"The {listed(plates)} {verb} slender: {math.floor(100 * counted)} % of the section counts in compression."


def tube_beyond_rule(rule: str) -> str:
    """A round tube thinner than the basis's rule covers."""
    return (
        f"The diameter over the thickness of the tube is above {rule}; the compression figure leaves out how much "
        "less of the section may count."
    )


def not_doubly_symmetric() -> str:
    """Flexural-torsional buckling is not computed."""
    return (
        "The section is not doubly symmetric; the compression figure leaves out flexural-torsional buckling and the "
        "eccentricity of its connection."
    )


def centroid_shift(shift: str) -> str:
    """One-sided loss moves the centroid."""
    return f"Loss on one side moves the centroid by {shift}; the compression figure leaves that eccentricity out."


def bowed(offset: str) -> str:
    """A recorded bow."""
    return f"A bow of {offset} is recorded; the compression figure leaves it out."


def half_through(k: float) -> str:
    """A top chord that nothing braces overhead."""
    return (
        f"The top chord is held sideways only by its verticals and floor beams: K out of plane {significant(k)} is "
        "assumed, and the lateral stability of the chord is not rated."
    )


def smaller_k(given: float) -> str:
    """The site gives a smaller K than a half-through chord may have."""
    what = f"K {significant(given)} out of plane"
    return f"The site gives {what} for a top chord that nothing braces overhead; it is not used."


def loaded_between_joints(bar: str) -> str:
    """The deck rests on the chord."""
    return f"The deck rests on {bar} between its joints; the bending that this gives is left out."


def very_slender(ratio: float, limit: int) -> str:
    """KL/r above the usual limit."""
    return f"KL/r is {significant(ratio)}, above {limit} (AASHTO LRFD 6.9.3, from memory)."


def uplift(joint: str, force: str, load: str | None) -> str:
    """A support that would lift."""
    cause = f" under {load}" if load else ""
    return f"The least factored reaction at {joint} is {force}{cause}: the bearing would lift unless it is held down."


def large_displacement(size: str, span: str) -> str:
    """Small-displacement statics is out of its depth."""
    limit = f"a fiftieth of the {span} span"
    return f"Under dead load and a full crowd a joint moves {size}, more than {limit}; check the model."


def sags(load: str, joint: str, size: str, limit: str) -> str:
    """The deck goes further down under people than the guide would have it."""
    return (
        f"Under {load} joint {joint} goes {size}, more than the {limit} that the AASHTO pedestrian guide 2009, 5, "
        "advises (from memory); deflection enters no rating factor."
    )


def swings(frequency: float, enough: float, weight: str) -> str:
    """The bridge swings at the pace of people."""
    by_weight = (
        f"below the {significant(enough)} Hz that 2.86 ln(180 kip/W) asks"
        if frequency < enough
        else "not below what 2.86 ln(180 kip/W) asks"
    )
    return (
        f"The vertical frequency is {significant(frequency)} Hz, below 3 Hz, and {by_weight} of a bridge that weighs "
        f"{weight} (AASHTO pedestrian guide 2009, 6, from memory): people may make it swing. It enters no factor."
    )


def not_used(key: str, why: str) -> str:
    """A key that is read and kept, but enters no figure."""
    return f"`{key}` is read, not used: {why}"


def double_bars(bars: tuple[str, ...]) -> str:
    """Several bars join the same joints."""
    return f"{listed(bars)} join the same joints; each is solved as a bar of its own."


def slack_out(bar: str) -> str:
    """A bar recorded as slack."""
    return f"{bar} is slack; the truss is rated with it and without it, and the lower figures are shown."


def no_state(number: int) -> str:
    """Bars without a recorded state."""
    verb = "has" if number == 1 else "have"
    return f"{count(number, 'bar')} {verb} no state on record and {'counts' if number == 1 else 'count'} as fair."
