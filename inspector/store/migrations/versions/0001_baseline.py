"""The first version of the tables. Released: never edited; a change is a migration of its own."""

from __future__ import annotations

from collections.abc import Iterator

import sqlalchemy as sa
from alembic import op

from inspector.store.base import PlainNumber

revision = "0001"
down_revision = None

Columns = Iterator[sa.Column[object]]


def upgrade() -> None:
    """Make all tables and the triggers that let the journal only grow."""
    _make_structure()
    _make_trusses()
    _make_loading()
    _make_journal()
    _let_grow("visit", ["bridge_id", "id"], ["bridge_id", "ordinal"])
    _let_grow("call", ["bridge_id", "visit_id", "ordinal"])
    _let_grow("entry", ["bridge_id", "id"], ["bridge_id", "visit_id", "ordinal"])
    _let_grow("rating", ["bridge_id", "ordinal"])


def _make_structure() -> None:
    _table(
        "bridge",
        _text("id"),
        _integer("ordinal"),
        _text("name"),
        _text("reference", "locality", optional=True),
        _integer("built", optional=True),
        _text(
            "units",
            "notes",
            "owner",
            "half_through",
            "instruments",
            "overrides",
            "recommendations",
            "written",
            optional=True,
        ),
        _boolean("has_visits"),
        key=["id"],
        unique=["ordinal"],
    )
    _table(
        "material",
        _text("bridge_id", "name"),
        _integer("ordinal"),
        _text("kind"),
        _quantity("E"),
        _quantity("density"),
        _quantity("Fy", optional=True),
        _quantity("Fu", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id", "name"],
    )
    _table(
        "section",
        _text("bridge_id", "name"),
        _integer("ordinal"),
        _text("shape"),
        _text("formed", optional=True),
        _boolean("rolled", optional=True),
        _quantity("area", optional=True),
        _quantity("inertia_horizontal", optional=True),
        _quantity("inertia_vertical", optional=True),
        _quantity("least_radius", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id", "name"],
    )
    _table(
        "section_dimension",
        _text("bridge_id", "section", "key"),
        _integer("ordinal"),
        _text("form"),
        _quantity("value", optional=True),
        _to(["bridge_id", "section"], "section", ["bridge_id", "name"]),
        key=["bridge_id", "section", "key"],
    )
    _table(
        "section_dimension_item",
        _text("bridge_id", "section", "key"),
        _integer("ordinal"),
        _quantity("value"),
        _to(["bridge_id", "section", "key"], "section_dimension", ["bridge_id", "section", "key"]),
        key=["bridge_id", "section", "key", "ordinal"],
    )
    _table(
        "section_rectangle",
        _text("bridge_id", "section", "key", "name"),
        _integer("ordinal"),
        _quantity("width"),
        _quantity("height"),
        _quantity("x"),
        _quantity("y"),
        _to(["bridge_id", "section", "key"], "section_dimension", ["bridge_id", "section", "key"]),
        key=["bridge_id", "section", "key", "name"],
    )


def _make_trusses() -> None:
    _table(
        "truss",
        _text("bridge_id", "name"),
        _integer("ordinal"),
        _text("top_chord"),
        _text("same_as", optional=True),
        _to(["bridge_id", "same_as"], "truss", ["bridge_id", "name"], last=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id", "name"],
    )
    _table(
        "joint",
        _text("bridge_id", "truss", "name"),
        _integer("ordinal"),
        _quantity("x"),
        _quantity("y"),
        _to(["bridge_id", "truss"], "truss", ["bridge_id", "name"]),
        key=["bridge_id", "truss", "name"],
    )
    _table(
        "support",
        _text("bridge_id", "truss", "joint"),
        _integer("ordinal"),
        _text("kind"),
        _to(["bridge_id", "truss", "joint"], "joint", ["bridge_id", "truss", "name"]),
        key=["bridge_id", "truss", "joint"],
    )
    _table(
        "bar",
        _text("bridge_id", "truss", "id"),
        _integer("ordinal"),
        _text("start", "end", "section", "material", "role"),
        _number("k_in_plane", "k_out_of_plane", optional=True),
        _quantity("unbraced_out_of_plane", optional=True),
        _text("ends", optional=True),
        _number("net_area", "shear_lag", optional=True),
        _text("connected", optional=True),
        _integer("turned", optional=True),
        _boolean("tension_only", optional=True),
        _text("system", "system_reason", optional=True),
        _quantity("stitch_spacing", optional=True),
        _to(["bridge_id", "material"], "material", ["bridge_id", "name"]),
        _to(["bridge_id", "section"], "section", ["bridge_id", "name"]),
        _to(["bridge_id", "truss", "end"], "joint", ["bridge_id", "truss", "name"]),
        _to(["bridge_id", "truss", "start"], "joint", ["bridge_id", "truss", "name"]),
        _to(["bridge_id", "truss"], "truss", ["bridge_id", "name"]),
        key=["bridge_id", "truss", "id"],
    )
    _table(
        "deck_joint",
        _text("bridge_id", "truss"),
        _integer("ordinal"),
        _text("joint"),
        _to(["bridge_id", "truss", "joint"], "joint", ["bridge_id", "truss", "name"]),
        key=["bridge_id", "truss", "ordinal"],
    )


def _make_loading() -> None:
    _table(
        "deck",
        _text("bridge_id"),
        _quantity("width"),
        _quantity("dead"),
        _quantity("dead_width", optional=True),
        _quantity("truss_spacing", optional=True),
        _quantity("wearing", optional=True),
        _quantity("edge", optional=True),
        _text("rests_on", "by_truss", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id"],
    )
    _table(
        "deck_share",
        _text("bridge_id", "what", "truss"),
        _integer("ordinal"),
        _quantity("value"),
        _to(["bridge_id", "truss"], "truss", ["bridge_id", "name"]),
        _to(["bridge_id"], "deck", ["bridge_id"]),
        key=["bridge_id", "what", "truss"],
    )
    _table(
        "rating_rules",
        _text("bridge_id", "basis"),
        _text("system", "system_reason", optional=True),
        _number("connection_allowance", optional=True),
        _text("unseen", "imposed", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id"],
    )
    _table(
        "live_load",
        _text("bridge_id", "name"),
        _integer("ordinal"),
        _text("kind"),
        _quantity("pressure", optional=True),
        _text("rule", optional=True),
        _quantity("track", optional=True),
        _text("vehicle", optional=True),
        _quantity("force", optional=True),
        _boolean("has_axles", "has_companions"),
        _to(["bridge_id"], "rating_rules", ["bridge_id"]),
        key=["bridge_id", "name"],
    )
    _table(
        "axle",
        _text("bridge_id", "live_load"),
        _integer("ordinal"),
        _quantity("position"),
        _quantity("weight"),
        _to(["bridge_id", "live_load"], "live_load", ["bridge_id", "name"]),
        key=["bridge_id", "live_load", "ordinal"],
    )
    _table(
        "companion",
        _text("bridge_id", "live_load"),
        _integer("ordinal"),
        _text("load"),
        _number("factor"),
        _to(["bridge_id", "live_load"], "live_load", ["bridge_id", "name"]),
        _to(["bridge_id", "load"], "live_load", ["bridge_id", "name"]),
        key=["bridge_id", "live_load", "ordinal"],
    )


def _make_journal() -> None:
    _table(
        "visit",
        _text("bridge_id", "id"),
        _integer("ordinal"),
        _text("date"),
        _text("inspector", "weather", "device", optional=True),
        _boolean("has_calls"),
        _text("written", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id", "id"],
        unique=["bridge_id", "ordinal"],
        grows=True,
    )
    _table(
        "call",
        _text("bridge_id", "visit_id"),
        _integer("ordinal"),
        _text("who", "when", "said", "left", optional=True),
        _to(["bridge_id", "visit_id"], "visit", ["bridge_id", "id"]),
        key=["bridge_id", "visit_id", "ordinal"],
        grows=True,
    )
    _table(
        "entry",
        _text("bridge_id", "id", "visit_id"),
        _integer("ordinal"),
        _text("truss", "bar", "device"),
        _integer("sequence"),
        _text("at", "seen", "reason", "state", "readings", optional=True),
        _number("estimated_loss", optional=True),
        _quantity("extent", optional=True),
        _number("station", optional=True),
        _text("bow", "crack", optional=True),
        _boolean("severed", "slack", optional=True),
        _text("replaced", optional=True),
        _boolean("look_unchanged", optional=True),
        _text("note", "photos", "chooses", "retracts", "written", optional=True),
        _to(["bridge_id", "truss", "bar"], "bar", ["bridge_id", "truss", "id"]),
        _to(["bridge_id", "visit_id"], "visit", ["bridge_id", "id"]),
        key=["bridge_id", "id"],
        unique=["bridge_id", "visit_id", "ordinal"],
        grows=True,
    )
    _table(
        "rating",
        _text("bridge_id"),
        _integer("ordinal"),
        _text("fingerprint", "program"),
        _text("made_from", "document", optional=True),
        _to(["bridge_id"], "bridge", ["id"]),
        key=["bridge_id", "ordinal"],
        grows=True,
    )
    op.create_index(
        "ix_entry_bridge_id_visit_id_device_sequence", "entry", ["bridge_id", "visit_id", "device", "sequence"]
    )


def _let_grow(name: str, *keys: list[str]) -> None:
    """Refuse UPDATE, DELETE, and an INSERT of a key that is there already."""
    for verb in ("UPDATE", "DELETE"):
        refusal = f"SELECT RAISE(ABORT, 'a stored {name} is never changed or removed');"
        op.execute(f"CREATE TRIGGER {name}_no_{verb.lower()} BEFORE {verb} ON {name} BEGIN {refusal} END")
    for number, key in enumerate(keys, start=1):
        same = " AND ".join(f"{column} = NEW.{column}" for column in key)
        there = f"EXISTS (SELECT 1 FROM {name} WHERE {same})"  # noqa: S608 (names of our own tables)
        refusal = f"SELECT RAISE(ABORT, 'this {name} is stored already');"
        op.execute(f"CREATE TRIGGER {name}_once_{number} BEFORE INSERT ON {name} WHEN {there} BEGIN {refusal} END")


def _table(
    name: str,
    *parts: Columns | tuple[list[str], str, list[str], bool],
    key: list[str],
    unique: list[str] | None = None,
    grows: bool = False,
) -> None:
    """Make a table; every constraint is named after the table and its columns, as in `base.NAMES`."""
    columns: list[sa.Column[object]] = []
    constraints: list[sa.Constraint] = [sa.PrimaryKeyConstraint(*key, name=f"pk_{name}")]
    for part in parts:
        if isinstance(part, tuple):
            own, table, far, last = part
            constraints.append(
                sa.ForeignKeyConstraint(
                    own,
                    [f"{table}.{column}" for column in far],
                    name=f"fk_{name}_{'_'.join(own)}",
                    deferrable=True if last else None,
                    initially="DEFERRED" if last else None,
                )
            )
        else:
            columns += part
    if unique:
        constraints.append(sa.UniqueConstraint(*unique, name=f"uq_{name}_{'_'.join(unique)}"))
    options = {"sqlite_with_rowid": False} if grows else {}
    op.create_table(name, *columns, *constraints, **options)


def _to(own: list[str], table: str, far: list[str], *, last: bool = False) -> tuple[list[str], str, list[str], bool]:
    """A foreign key; with ``last`` looked at when all rows of a transaction are there."""
    return own, table, far, last


def _text(*names: str, optional: bool = False) -> Columns:
    return (sa.Column(name, sa.Text(), nullable=optional) for name in names)


def _integer(*names: str, optional: bool = False) -> Columns:
    return (sa.Column(name, sa.Integer(), nullable=optional) for name in names)


def _boolean(*names: str, optional: bool = False) -> Columns:
    return (sa.Column(name, sa.Boolean(), nullable=optional) for name in names)


def _number(*names: str, optional: bool = False) -> Columns:
    return (sa.Column(name, PlainNumber(), nullable=optional) for name in names)


def _quantity(name: str, *, optional: bool = False) -> Columns:
    """As typed, and in SI base units."""
    yield sa.Column(f"{name}_text", sa.Text(), nullable=optional)
    yield sa.Column(f"{name}_si", sa.REAL(), nullable=optional)
