"""One way through the app as a user goes it: a desktop window, a mouse, closed and opened again."""

from __future__ import annotations

import json
import os
import shutil
import signal
import subprocess
import sys
import time
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

import pytest

from inspector import samples
from inspector.app.memory import recall
from inspector.store import open_store

SCRIPT = Path(__file__).with_name("journey.py")
TOOLS = {"Xvfb": "xvfb", "xdotool": "xdotool"}


@pytest.fixture
def display(screen_of_tests: None) -> Iterator[str]:
    """An X server without a screen; its display."""
    absent = [package for tool, package in TOOLS.items() if shutil.which(tool) is None]
    if absent:
        message = f"apt-get install {' '.join(absent)}"
        if os.environ.get("CI") == "true":
            pytest.fail(f"a build has to go the journey: {message}")
        pytest.skip(message)
    reading, writing = os.pipe()
    server = subprocess.Popen(
        ["Xvfb", "-displayfd", str(writing), "-screen", "0", "1280x800x24", "-nolisten", "tcp"],
        pass_fds=[writing],
        stderr=subprocess.DEVNULL,
    )
    os.close(writing)
    with os.fdopen(reading) as stream:
        number = stream.readline().strip()
    yield f":{number}"
    server.terminate()
    server.wait(timeout=20)


def go(part: str, folder: Path, display: str) -> dict[str, Any]:
    """One start of the app to its end; what was seen."""
    environment = {name: value for name, value in os.environ.items() if not name.startswith("KIVY_")}
    done = subprocess.run(
        [sys.executable, str(SCRIPT), str(folder), part],
        env=environment | {"DISPLAY": display},
        capture_output=True,
        text=True,
        timeout=300,
        check=False,
    )
    assert done.returncode == 0, done.stderr[-3000:]
    found: dict[str, Any] = json.loads(done.stdout.strip().splitlines()[-1])
    return found


@pytest.mark.slow
def test_a_user_logs_a_reading_makes_the_report_and_comes_back_to_the_bar(tmp_path: Path, display: str) -> None:
    """Open a sample, click a bar, type a reading, see the figure fall, make the PDF, close, open at the same bar."""
    seen = go("first", tmp_path, display)
    assert seen["bar"] == "L3-L4"
    assert seen["stored"] == "Stored: bottom wall 2.5 mm at 0.50 (L3-L4)"
    before, after = seen["after"].split(" → ")
    assert before == seen["before"]
    assert float(after) < float(before)
    (report,) = (tmp_path / "reports").iterdir()
    assert seen["report"] == f"Written to {report}."
    assert report.read_bytes().startswith(b"%PDF")
    back = go("again", tmp_path, display)
    assert back == {"screen": "bridge", "bar": "L3-L4", "figure": after, "entries": 2}


def test_the_command_saves_the_site_and_opens_it(screen_of_tests: None, tmp_path: Path) -> None:
    """`inspector app SITE` puts the bridge into the store and opens at it; ending it leaves the store whole."""
    site = Path(__file__).parents[2] / "sample_sites" / "three-supports.json"
    command = [sys.executable, "-m", "inspector", "app", str(site), "--store", str(tmp_path / "store.db")]
    environment = {name: value for name, value in os.environ.items() if not name.startswith("KIVY_")}
    with subprocess.Popen(command, env=environment | {"SDL_VIDEODRIVER": "offscreen"}, cwd=site.parents[1]) as app:
        end = time.monotonic() + 120
        while not (tmp_path / "field-app.json").exists() and time.monotonic() < end and app.poll() is None:
            time.sleep(0.1)
        assert app.poll() is None
        app.terminate()
    memory = recall(tmp_path / "field-app.json")
    with open_store(tmp_path / "store.db") as store:
        (bridge,) = store.bridges()
    assert (memory.bridge, bridge.name) == (bridge.id, samples.sample("three-supports").bridge.name)
    assert memory.bar is not None


def test_what_was_shown_as_stored_outlives_a_kill(drive: Callable[..., Any], tmp_path: Path) -> None:
    """Killed the moment the screen says `Stored`, the app opens again at the same bar with the entry on record."""
    script = Path(__file__).with_name("killed.py")
    environment = {name: value for name, value in os.environ.items() if not name.startswith("KIVY_")}
    done = subprocess.run([sys.executable, str(script), str(tmp_path)], env=environment, timeout=300, check=False)
    assert done.returncode == -signal.SIGKILL
    d = drive()
    d.settled()
    assert d.app.bridge_screen.bar == "L3-L4"
    assert d.button("At a distance").chosen
