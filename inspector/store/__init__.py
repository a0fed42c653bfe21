"""The store: structures in tables, an append-only journal, SQLite underneath."""

from inspector.store.errors import StoreError
from inspector.store.store import Added, BridgeSummary, Store, StoredRating, open_store

__all__ = ["Added", "BridgeSummary", "Store", "StoreError", "StoredRating", "open_store"]
