"""The theme as kivy sees it: a property a role, so that the screens change colour at once."""

from __future__ import annotations

from typing import Any

from kivy.event import EventDispatcher
from kivy.properties import ColorProperty

from inspector.app.theme import NAMES, THEMES


class Paint(EventDispatcher):
    """The colours of the moment, by the roles of `inspector.app.theme.Roles`."""

    def __init__(self, name: str, **options: Any) -> None:
        super().__init__(**options)
        for role in NAMES:
            self.apply_property(**{role: ColorProperty([0, 0, 0, 1])})
        self.wear(name)

    def wear(self, name: str) -> None:
        """Take a theme's colours; an unknown name is the field theme."""
        roles = THEMES.get(name, THEMES["field"])
        for role in NAMES:
            setattr(self, role, getattr(roles, role))
