"""The same values give the same file, to the byte."""

from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

from report import invented, sample

from inspector import desk

ROOT = Path(__file__).parents[2]
SAMPLE = ROOT / "sample_sites" / "severed-hanger.json"
PRINT = """
import sys
from pathlib import Path
from inspector import desk
sys.stdout.buffer.write(desk.report(desk.rate(desk.check(Path(sys.argv[1])))))
"""


def printed(seed: str, zone: str, language: str) -> subprocess.Popen[bytes]:
    """Start a fresh process that prints a sample."""
    surroundings = {**os.environ, "PYTHONHASHSEED": seed, "TZ": zone, "LC_ALL": language, "PYTHONPATH": str(ROOT)}
    return subprocess.Popen([sys.executable, "-c", PRINT, str(SAMPLE)], env=surroundings, stdout=subprocess.PIPE)


def test_two_processes_print_the_same_bytes() -> None:
    """Hash seed, time zone and locale leave no trace in the file."""
    first, second = printed("1", "Pacific/Auckland", "C"), printed("4242", "America/Lima", "C.UTF-8")
    here, there = first.communicate()[0], second.communicate()[0]
    assert first.returncode == second.returncode == 0
    assert here.startswith(b"%PDF-")
    assert here == there


def test_printing_twice_changes_nothing() -> None:
    """A second report in the same process equals the first."""
    rated = sample.rated(SAMPLE.stem)
    assert desk.report(rated) == desk.report(rated)


def test_the_invented_values_are_the_same_every_time() -> None:
    """The fixture itself holds nothing that changes."""
    assert invented.rating(invented.bridge()) == invented.rating(invented.bridge())
