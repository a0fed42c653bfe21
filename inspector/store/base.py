"""The vocabulary of the tables: how values become columns, and how constraints are named."""

from __future__ import annotations

import json
from collections.abc import Callable
from typing import Annotated, Any, ClassVar, Final

from sqlalchemy import REAL, Dialect, ForeignKey, MetaData, Text
from sqlalchemy.orm import DeclarativeBase, mapped_column
from sqlalchemy.types import TypeDecorator, UserDefinedType

NAMES: Final = {
    "pk": "pk_%(table_name)s",
    "fk": "fk_%(table_name)s_%(column_0_N_name)s",
    "uq": "uq_%(table_name)s_%(column_0_N_name)s",
    "ix": "ix_%(table_name)s_%(column_0_N_name)s",
    "ck": "ck_%(table_name)s_%(constraint_name)s",
}
"""Every constraint has a name, so that a later migration can speak of it."""


_TOO_WIDE: Final = 2**63


class PlainNumber(UserDefinedType[float]):
    """A bare number of a site file, as it was written.

    A column without a declared type keeps 1 and 1.0 apart; a REAL or NUMERIC one would not, and the
    site would not be written back as it was read. A whole number beyond SQLite's 64 bits is kept by its digits.
    """

    cache_ok = True

    def get_col_spec(self, **_: object) -> str:
        """No declared type."""
        return ""

    def bind_processor(self, dialect: Dialect) -> Callable[[float | None], float | str | None]:
        """From a number to what SQLite holds without changing it."""
        return lambda number: str(number) if isinstance(number, int) and abs(number) >= _TOO_WIDE else number

    def result_processor(self, dialect: Dialect, coltype: object) -> Callable[[float | str | None], float | None]:
        """From what SQLite holds to the number."""
        return lambda held: int(held) if isinstance(held, str) else held


class PlainJson(TypeDecorator[Any]):
    """JSON in a text column; None is NULL.

    SQLAlchemy's own JSON type declares a column that SQLite takes for numeric, which turns 1.0 into 1.
    """

    impl = Text
    cache_ok = True

    def process_bind_param(self, value: Any | None, dialect: Dialect) -> str | None:
        """From plain values to text."""
        return None if value is None else json.dumps(value, ensure_ascii=False, allow_nan=False)

    def process_result_value(self, value: Any | None, dialect: Dialect) -> Any | None:
        """From text to plain values."""
        return None if value is None else json.loads(value)


class Base(DeclarativeBase):
    """All tables of the store."""

    metadata = MetaData(naming_convention=NAMES)
    type_annotation_map: ClassVar[dict[Any, Any]] = {str: Text(), float: REAL()}


BridgeKey = Annotated[str, mapped_column(ForeignKey("bridge.id"), primary_key=True)]
Key = Annotated[str, mapped_column(primary_key=True)]
Place = Annotated[int, mapped_column(primary_key=True)]
Number = Annotated[float, mapped_column(PlainNumber())]
Document = Annotated[Any, mapped_column(PlainJson(), nullable=True)]
