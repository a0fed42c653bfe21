"""A dead battery, as near as a test comes to it: the process is killed at random moments of logging."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path

ROUNDS = 54


def test_nothing_that_was_shown_as_stored_is_lost(tmp_path: Path) -> None:
    """After every kill the store opens, holds each acknowledged entry whole and in order, and at most one more."""
    helper = Path(__file__).with_name("kill_rounds.py")
    arguments = [sys.executable, "-W", "error", str(helper), str(tmp_path), str(ROUNDS), "20260514"]
    # One thread alone may be alive where a process forks, so numpy may not start its own.
    quiet = os.environ | {"OPENBLAS_NUM_THREADS": "1", "OMP_NUM_THREADS": "1", "PYTHONPATH": os.pathsep.join(sys.path)}
    done = subprocess.run(arguments, capture_output=True, text=True, check=False, env=quiet)
    assert (done.returncode, done.stderr) == (0, "")
    rounds = [json.loads(line) for line in done.stdout.splitlines()]
    assert len(rounds) == ROUNDS
    for one in rounds:
        assert one["in order"], one
        assert one["whole"], one
        assert one["more"] in {0, 1}, one
        assert one["integrity"] == "ok", one
    counts = [one["acknowledged"] for one in rounds]
    assert sum(counts) > ROUNDS, "the kills came before anything was logged and show nothing"
    assert len(set(counts)) > 3, "the kills all came at the same moment"
