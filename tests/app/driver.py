"""One running app in a real window: ticked frame by frame, touched as by a finger."""

from __future__ import annotations

import gc
import time
from collections.abc import Callable
from pathlib import Path
from typing import Any

TABLET = (1280, 800)


class Driver:
    """The app of a test. Kivy is imported when the first one is made."""

    def __init__(self, app: Any, size: tuple[int, int] = TABLET) -> None:
        from kivy.base import EventLoop, runTouchApp
        from kivy.core.window import Window

        self.app, self.window, self.loop = app, Window, EventLoop
        EventLoop.ensure_window()
        Window.size = size
        app._run_prepare()  # the one private name of kivy's that is used, and only here
        if EventLoop.status != "started":
            runTouchApp(embedded=True)
        self.frames(3)

    def frames(self, count: int = 1) -> None:
        """Tick frames; the last of them is drawn."""
        self.blind_frames(count - 1)
        self.loop.idle()

    def blind_frames(self, count: int = 1) -> None:
        """Tick frames without drawing them: everything is laid out as it would be seen."""
        from kivy.clock import Clock
        from kivy.lang import Builder

        for _ in range(count):
            Clock.tick()
            self.loop.dispatch_input()
            Builder.sync()
            Clock.tick_draw()
            Builder.sync()

    def until(self, condition: Callable[[], Any], timeout: float = 30.0) -> None:
        """Tick until something is so."""
        end = time.monotonic() + timeout
        while not condition():
            if time.monotonic() > end:
                raise AssertionError("the condition was not met in time")
            self.blind_frames()
            time.sleep(0.002)

    def settled(self) -> None:
        """Tick until the worker has nothing left to do and every layout has settled."""
        done: list[bool] = []
        self.app.worker.ask(lambda: None, lambda _: done.append(True))
        self.until(lambda: bool(done))
        done.clear()
        self.app.worker.ask(lambda: None, lambda _: done.append(True))
        self.until(lambda: bool(done))
        self.frames(6)

    def tap_at(self, x: float, y: float) -> None:
        """Touch a point of the window, px from its lower left corner."""
        from kivy.tests.common import UnitTestTouch

        touch = UnitTestTouch(x, y)
        touch.touch_down()
        self.frames()
        touch.touch_up()
        self.frames(2)

    def reveal(self, widget: Any) -> None:
        """Scroll by the buttons, as a gloved hand would, until the middle of a widget is in sight."""
        from inspector.app.widgets.scroller import Scroller

        parent = widget.parent
        while parent is not None and parent is not parent.parent and not isinstance(parent, Scroller):
            parent = parent.parent
        for _ in range(40):
            if not isinstance(parent, Scroller):
                return
            view, middle = parent.ids.view, widget.to_window(*widget.center)[1]
            low = view.to_window(view.x, view.y)[1]
            if low < middle < low + view.height:
                return
            button = parent.ids.down if middle <= low else parent.ids.up
            self.tap_at(*button.to_window(*button.center))
        raise AssertionError("the widget cannot be scrolled into sight")

    def tap(self, widget: Any) -> None:
        """Touch the middle of a widget, scrolled into sight."""
        self.reveal(widget)
        self.tap_at(*widget.to_window(*widget.center))

    def button(self, words: str, within: Any = None) -> Any:
        """The button on which these words stand."""
        from inspector.app.widgets.push import Push

        root = self.app.root if within is None else within
        found = [one for one in root.walk(restrict=True) if isinstance(one, Push) and one.words.startswith(words)]
        if not found:
            raise AssertionError(
                f"no button `{words}`; there are {[w.words for w in root.walk(restrict=True) if isinstance(w, Push)]}"
            )
        return found[0]

    def push(self, words: str) -> None:
        """Touch the button on which these words stand."""
        self.tap(self.button(words))

    def tap_bar(self, bar: str) -> None:
        """Touch a bar of the drawing, in its middle."""
        elevation = self.app.bridge_screen.drawing.elevation
        start, end = elevation.pieces(["axis"])[bar][0]
        at = (start[0] + end[0]) / 2, (start[1] + end[1]) / 2
        self.tap_at(*elevation.to_window(*at))

    def type(self, text: str) -> None:
        """Type a text into whatever has the focus."""
        for sign in text:
            self.window.dispatch("on_textinput", sign)
        self.frames(2)

    def picture(self, path: Path) -> Path:
        """Keep what the window shows as a PNG."""
        from PIL import Image

        self.frames(2)
        width, height = self.window.size
        self.window.on_draw()
        from kivy.graphics.opengl import GL_RGBA, GL_UNSIGNED_BYTE, glReadPixels

        pixels = glReadPixels(0, 0, int(width), int(height), GL_RGBA, GL_UNSIGNED_BYTE)
        image = Image.frombytes("RGBA", (int(width), int(height)), pixels)
        image.transpose(Image.Transpose.FLIP_TOP_BOTTOM).convert("RGB").save(path)
        self.window.flip()
        return path

    def close(self) -> None:
        """End the app; the window stays for the next one."""
        from kivy.app import App
        from kivy.metrics import Metrics

        for child in self.window.children[:]:
            self.window.remove_widget(child)
        self.app.dispatch("on_stop")
        App._running_app = None
        self.frames(2)
        del self.app
        gc.collect()  # what hangs in circles would hear of the next app's text size
        Metrics.fontscale = 1.0
