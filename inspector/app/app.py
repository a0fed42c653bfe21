"""The app: store, worker, presenters and screens put together, and the way from one screen to another."""

from __future__ import annotations

import contextlib
import webbrowser
from collections.abc import Callable
from dataclasses import replace
from enum import StrEnum
from pathlib import Path
from typing import Any

from kivy.app import App
from kivy.clock import Clock
from kivy.core.window import Window
from kivy.metrics import Metrics
from kivy.properties import ObjectProperty
from kivy.uix.screenmanager import NoTransition, ScreenManager

from inspector.app.bootstrap import register_fonts
from inspector.app.bridge.presenter import BridgePresenter
from inspector.app.bridge.screen import BridgeScreen
from inspector.app.bridges.presenter import BridgesPresenter
from inspector.app.bridges.screen import BridgesScreen
from inspector.app.memory import Memory, keep, recall
from inspector.app.report.presenter import ReportPresenter
from inspector.app.report.screen import ReportScreen
from inspector.app.shelf import Shelf
from inspector.app.widgets.paint import Paint
from inspector.app.worker import Failure, Worker
from inspector.desk import Rated
from inspector.store import open_store

_ESCAPE = 27
_KEYS = {275: "next", 276: "previous", 43: "nearer", 61: "nearer", 270: "nearer", 45: "further", 269: "further"}
TEXT_SIZES = (100, 150, 200)


class Route(StrEnum):
    """The screens by name."""

    BRIDGES = "bridges"
    BRIDGE = "bridge"
    REPORT = "report"


class FieldApp(App):
    """The field app.

    Parameters
    ----------
    store : path of the store.
    memory_file : the file that knows where the inspector was.
    device : id of this device.
    bridge : id of the bridge to open; where none is given, the one of the last time.
    """

    theme = ObjectProperty(None)

    def __init__(self, store: Path, memory_file: Path, device: str, bridge: str | None = None, **options: Any) -> None:
        super().__init__(**options)
        register_fonts()
        self.title = "Truss footbridge inspector"
        self._memory_file = memory_file
        self.memory: Memory = recall(memory_file)
        self._first = bridge
        self._letters = float(Metrics.fontscale)
        self.theme = Paint(self.memory.theme)
        self.store = open_store(store)
        self.worker = Worker(_deliver)
        self.shelf = Shelf(self.store, device)

    def build(self) -> Any:
        """Make the screens and their presenters."""
        self._set_text_size(self.memory.text_size)
        self.screens = ScreenManager(transition=NoTransition())
        self.bridge_screen = BridgeScreen(name=Route.BRIDGE.value)
        self.bridges_screen = BridgesScreen(name=Route.BRIDGES.value)
        self.report_screen = ReportScreen(name=Route.REPORT.value)
        self.bridge = BridgePresenter(self.shelf, self.worker, self.bridge_screen.show, self._remember_place)
        self.bridge_screen.presenter = self.bridge
        self.bridges = BridgesPresenter(self.shelf, self.worker, self.bridges_screen.show, self._opened)
        self.report = ReportPresenter(self.shelf, self.worker, self.report_screen.show, opener())
        self.bridges_screen.bind(on_open=self._open, on_sample=self._sample)
        self.bridges_screen.bind(on_theme=self._other_theme, on_text_size=self._next_text_size)
        self.bridge_screen.bind(on_back=self._to_bridges, on_report=self._to_report)
        self.report_screen.bind(on_make=self._make_report, on_view=self._view_report, on_back=self._to_bridge)
        for screen in (self.bridges_screen, self.bridge_screen, self.report_screen):
            self.screens.add_widget(screen)
        self._show_settings()
        return self.screens

    def on_start(self) -> None:
        """Open the bridge that is asked for, or the one of the last time."""
        Window.bind(on_keyboard=self._key)
        self.navigate(Route.BRIDGES)
        wanted = self._first or self.memory.bridge
        if wanted is not None:
            self.worker.ask(lambda: self.shelf.rated(wanted), self._reopened)

    def on_stop(self) -> None:
        """Finish what is being stored, and close."""
        Window.unbind(on_keyboard=self._key)
        self.bridge.close()
        self.worker.close()
        self.store.close()

    def on_pause(self) -> bool:
        """Nothing is unsaved: every tap is stored when it is made."""
        return True

    # --- navigation ---

    def navigate(self, route: Route) -> None:
        """Show a screen."""
        self.screens.current = route.value
        if route is Route.BRIDGES:
            self.bridges.enter()
        else:
            self.bridges.leave()

    def _reopened(self, found: Rated | Failure) -> None:
        if not isinstance(found, Failure) and self.screens.current == Route.BRIDGES.value:
            self._opened(found)

    def _opened(self, rated: Rated) -> None:
        memory = self.memory
        here = memory.bridge == rated.bridge.id and memory.truss is not None and memory.bar is not None
        place = (str(memory.truss), str(memory.bar)) if here else None
        self.bridge_screen.back_to_bar()
        self.bridge.open(rated, place, memory.view)
        self.navigate(Route.BRIDGE)

    def _open(self, _: Any, bridge: str) -> None:
        self.bridges.open(bridge)

    def _sample(self, _: Any, name: str) -> None:
        self.bridges.add_sample(name)

    def _to_bridges(self, *_: Any) -> None:
        self.navigate(Route.BRIDGES)

    def _to_bridge(self, *_: Any) -> None:
        self.navigate(Route.BRIDGE)

    def _to_report(self, *_: Any) -> None:
        if self.bridge.rated is not None:
            self.report.enter(self.bridge.rated)
            self.navigate(Route.REPORT)

    def _make_report(self, *_: Any) -> None:
        self.report.make()

    def _view_report(self, *_: Any) -> None:
        self.report.open_file()

    def _key(self, _: Any, key: int, *__: Any) -> bool:
        """Keys do what touches do."""
        current = self.screens.current
        if key == _ESCAPE:
            return self._back(current)
        if current != Route.BRIDGE.value or not self.bridge_screen.at_home or _typing():
            return False
        elevation = self.bridge_screen.drawing.elevation
        acts: dict[str, Callable[[], None]] = {
            "next": lambda: self.bridge.step(1),
            "previous": lambda: self.bridge.step(-1),
            "nearer": elevation.nearer,
            "further": lambda: elevation.nearer(-1),
        }
        act = acts.get(_KEYS.get(key, ""))
        if act is not None:
            act()
        return act is not None

    def _back(self, current: str) -> bool:
        """One step back; at the first screen the system may have the key."""
        if current == Route.REPORT.value:
            self.navigate(Route.BRIDGE)
        elif current == Route.BRIDGE.value and not self.bridge_screen.at_home:
            self.bridge_screen.back_to_bar()
        elif current == Route.BRIDGE.value:
            self.navigate(Route.BRIDGES)
        else:
            return False
        return True

    # --- what is remembered ---

    def _remember_place(self, bridge: str, truss: str, bar: str, view: str) -> None:
        self._remember(replace(self.memory, bridge=bridge, truss=truss, bar=bar, view=view))

    def _other_theme(self, *_: Any) -> None:
        self._remember(replace(self.memory, theme="sun" if self.memory.theme == "field" else "field"))
        self.theme.wear(self.memory.theme)
        self._show_settings()

    def _next_text_size(self, *_: Any) -> None:
        now = self.memory.text_size
        size = TEXT_SIZES[(TEXT_SIZES.index(now) + 1) % len(TEXT_SIZES)] if now in TEXT_SIZES else TEXT_SIZES[0]
        self._remember(replace(self.memory, text_size=size))
        self._set_text_size(size)
        self._show_settings()

    def _set_text_size(self, per_cent: int) -> None:
        Metrics.fontscale = self._letters * min(max(per_cent, TEXT_SIZES[0]), TEXT_SIZES[-1]) / 100

    def _show_settings(self) -> None:
        self.bridges_screen.theme_now = self.memory.theme
        self.bridges_screen.text_size_now = self.memory.text_size

    def _remember(self, memory: Memory) -> None:
        """Keep where the inspector is. That this fails must not stop anybody who logs."""
        if memory != self.memory:
            self.memory = memory
            self.worker.ask(lambda: keep(self._memory_file, memory), lambda _: None, "memory")


def _deliver(call: Callable[[], None]) -> None:
    Clock.schedule_once(lambda _: call(), 0)


def _typing() -> bool:
    return any(getattr(widget, "focus", False) for widget in Window.children for widget in widget.walk(restrict=True))


def opener() -> Callable[[Path], None] | None:
    """How this device shows a file in another program; None where it cannot."""
    with contextlib.suppress(webbrowser.Error):
        browser = webbrowser.get()
        return lambda path: _show_file(browser, path)
    return None


def _show_file(browser: webbrowser.BaseBrowser, path: Path) -> None:
    browser.open(path.as_uri())
