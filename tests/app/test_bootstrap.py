"""What `inspector app` looks for before it loads kivy."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest

from inspector.app import bootstrap
from inspector.cli.app import run

ALL = frozenset(library for library, _ in bootstrap.LIBRARIES)


def test_nothing_is_missing_on_a_desktop() -> None:
    """With a display and the libraries, any of the three ways to name a display will do."""
    for name in ("DISPLAY", "WAYLAND_DISPLAY", "SDL_VIDEODRIVER"):
        assert bootstrap.missing({name: "x"}, "linux", lambda _: True) == ""


def test_without_a_display_one_line_says_so() -> None:
    """An empty value is no display; the line names the variables and what to install."""
    said = bootstrap.missing({"DISPLAY": ""}, "linux", lambda _: True)
    assert "DISPLAY" in said
    assert "xvfb" in said
    assert "\n" not in said


@pytest.mark.parametrize("absent", sorted(ALL))
def test_a_missing_library_is_named_with_its_packages(absent: str) -> None:
    """Each library that cannot be loaded is named, with the Debian packages to install, in one line."""
    said = bootstrap.missing({"DISPLAY": ":0"}, "linux", lambda library: library != absent)
    assert absent in said
    assert "apt-get install libgl1 libegl1 libgl1-mesa-dri" in said
    assert not any(other in said for other in ALL - {absent})
    assert "\n" not in said


def test_elsewhere_the_system_brings_its_own() -> None:
    """Only Linux needs the packages."""
    assert bootstrap.missing({}, "win32", lambda _: False) == ""


def test_the_command_says_what_is_missing_and_stores_nothing(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    """Exit code 1, one line on the error stream, no store was made."""
    for name in ("DISPLAY", "WAYLAND_DISPLAY", "SDL_VIDEODRIVER"):
        monkeypatch.delenv(name, raising=False)
    site = Path(__file__).parents[2] / "sample_sites" / "pratt-half-through.json"
    assert run(["app", str(site), "--store", str(tmp_path / "store.db")]) == 1
    said = capsys.readouterr().err
    assert said.startswith("The field app needs a window: ")
    assert said.count("\n") == 1
    assert list(tmp_path.iterdir()) == []


def test_presenters_states_and_the_bootstrap_load_no_kivy() -> None:
    """Everything but screens and widgets can be imported, and tested, where there is no kivy."""
    code = (
        "import sys; sys.modules['kivy'] = None; "
        "import inspector.app.bootstrap, inspector.app.bridge.presenter, inspector.app.bridges.presenter, "
        "inspector.app.report.presenter, inspector.app.bridge.pad, inspector.app.memory, inspector.app.room, "
        "inspector.app.shelf, inspector.app.strokes, inspector.app.theme, inspector.app.worker, inspector.cli.app"
    )
    subprocess.run(
        [sys.executable, "-c", code], check=True, env={**os.environ, "PYTHONPATH": os.pathsep.join(sys.path)}
    )
