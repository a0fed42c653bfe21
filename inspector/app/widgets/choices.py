"""A group of buttons kept in step with the choices of a state, without taking a button away under a finger."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from typing import Any, Protocol

from inspector.app.widgets.push import Push


class Choice(Protocol):
    """One button of a group; see `inspector.app.bridge.state.Choice`."""

    @property
    def key(self) -> str:
        """What it stands for."""
        ...

    @property
    def text(self) -> str:
        """What stands on it."""
        ...

    @property
    def chosen(self) -> bool:
        """Whether it is the chosen one."""
        ...

    @property
    def enabled(self) -> bool:
        """Whether it can be used now."""
        ...


def offer(tiles: Any, choices: Sequence[Choice], picked: Callable[[str], None], kind: type[Push] = Push) -> None:
    """Show these choices on a layout's buttons; ``picked`` is told the key of the one that is tapped."""
    present = [button.key for button in tiles.children[::-1]]
    if present != [choice.key for choice in choices]:
        tiles.clear_widgets()
        for choice in choices:
            button = kind(key=choice.key)
            button.bind(on_release=lambda _, key=choice.key: picked(key))
            tiles.add_widget(button)
    for button, choice in zip(tiles.children[::-1], choices, strict=True):
        button.words, button.chosen, button.disabled = choice.text, choice.chosen, not choice.enabled
