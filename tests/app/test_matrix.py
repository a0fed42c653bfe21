"""Nothing is cut off, overlaps or is too small to touch, in any size, density and text size."""

from __future__ import annotations

import os
import subprocess
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest
from app.audit import Box, _too_close, faults
from app.matrix import SIZES


@pytest.mark.slow
@pytest.mark.parametrize("density", SIZES)
def test_every_screen_holds_in_every_size_and_text_size(screen_of_tests: None, tmp_path: Path, density: float) -> None:
    """1280 x 800, 800 x 1280, 1024 x 600 at density 1, 2000 x 1200 at 1.5, 2560 x 1600 at 2, text up to 200 %.

    A density is fixed when kivy is loaded, so each is walked in a process of its own.
    """
    script = Path(__file__).with_name("matrix.py")
    environment = {name: value for name, value in os.environ.items() if not name.startswith("KIVY_")}
    done = subprocess.run(
        [sys.executable, str(script), str(density)],
        env=environment | {"TMPDIR": str(tmp_path)},
        capture_output=True,
        text=True,
        timeout=900,
        check=False,
    )
    assert done.stdout.strip() == "nothing is wrong", done.stdout + done.stderr[-2000:]


def test_what_is_cut_off_too_small_or_reaches_out_is_found(drive: Callable[..., Any]) -> None:
    """The audit itself: a shrunken button, a cut text and a button beyond the edge are each named."""
    d = drive()
    d.settled()
    assert faults(d) == []
    button = d.button("Brenlow")
    button.size = (60, 20)
    button.texture_update()
    assert any("too small" in fault for fault in faults(d))
    assert any("cut off" in fault for fault in faults(d))
    d.button("Sun screen").x = 1270
    assert any("reaches out" in fault for fault in faults(d))


def test_targets_need_eight_between_them_and_texts_must_not_meet() -> None:
    """Two boxes that touch are apart enough for texts, not for targets; overlapping ones for neither."""
    one = Box("one", 0, 0, 100, 57, target=True)
    beside = Box("beside", 104, 0, 200, 57, target=True)
    over = Box("over", 50, 20, 200, 57, target=True)
    assert _too_close(one, beside, 0) == []
    assert _too_close(one, beside, 8) == ["one and beside are 4 px apart"]
    assert len(_too_close(one, over, 0)) == 1
