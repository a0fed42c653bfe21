"""What can go wrong with the store, in words that tell what to do."""

from __future__ import annotations

from models.errors import InspectorError


class StoreError(InspectorError):
    """The store cannot be opened, read or written, or refuses what it was given. Nothing was changed."""
