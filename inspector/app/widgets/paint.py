"""The theme as kivy sees it: a property a role, so that the screens change colour at once."""

from __future__ import annotations

from typing import Any

from kivy.event import EventDispatcher
from kivy.properties import ColorProperty

from inspector.app.theme import NAMES, THEMES

# Kivy binds only to properties that a class is made with, and takes a name that begins with `on_` for an event.
_Roles: Any = type("_Roles", (EventDispatcher,), {role: ColorProperty([0, 0, 0, 1]) for role in NAMES})


class Paint(_Roles):
    """The colours of the moment, by the roles of `inspector.app.theme.Roles`."""

    def __init__(self, name: str, **options: Any) -> None:
        super().__init__(**options)
        self.wear(name)

    def wear(self, name: str) -> None:
        """Take a theme's colours; an unknown name is the field theme."""
        roles = THEMES.get(name, THEMES["field"])
        for role in NAMES:
            setattr(self, role, getattr(roles, role))
