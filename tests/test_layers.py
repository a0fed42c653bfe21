"""Which part may load which: the core stays alone, and a command loads only what it needs. In fresh processes."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
SAMPLE = "sample_sites/three-supports.json"
SCREEN = {"kivy"}
STORE = {"sqlalchemy", "alembic"}
PAPER = {"reportlab", "PIL"}
TERMINAL = {"typer", "rich", "click"}

COMMANDS = {
    "check": (["check", SAMPLE], SCREEN | STORE | PAPER),
    "rate": (["rate", SAMPLE], SCREEN | STORE | PAPER),
    "rate --json": (["rate", SAMPLE, "--json", "-"], SCREEN | STORE | PAPER),
    "explain": (["explain", SAMPLE, "basin side/B5-T6"], SCREEN | STORE | PAPER),
    "report": (["report", SAMPLE, "--output", "{folder}/report.pdf"], SCREEN | STORE),
    "demo": (["demo", "--folder", "{folder}"], SCREEN),
}
"""Each command with an example, and what it must not load."""


def python(code: str, *options: str) -> str:
    """What a fresh interpreter prints."""
    done = subprocess.run(
        [sys.executable, *options, "-c", code], cwd=ROOT, capture_output=True, text=True, check=True, encoding="utf-8"
    )
    return done.stdout


def test_models_import_nothing_but_numpy() -> None:
    """Every module of the core together loads no shell, screen, database, PDF or terminal library."""
    code = """
import importlib, json, pkgutil, sys
import models
names = [found.name for found in pkgutil.walk_packages(models.__path__, "models.")]
for name in names:
    importlib.import_module(name)
print(json.dumps([names, sorted({name.partition(".")[0] for name in sys.modules})]))
"""
    names, loaded = json.loads(python(code))
    assert {"models.rating.rate", "models.section.registry", "models.condition"} <= set(names)
    assert set(loaded) & ({"inspector"} | SCREEN | STORE | PAPER | TERMINAL) == set()
    known = {"numpy", "models", *sys.stdlib_module_names}
    assert {name for name in loaded if not name.startswith("_") and name not in known} <= _of_the_interpreter()


def _of_the_interpreter() -> set[str]:
    """What this installation loads into every process, before any program of ours."""
    code = "import json, sys, numpy; print(json.dumps([name.partition('.')[0] for name in sys.modules]))"
    return set(json.loads(python(code)))


def test_every_command_but_the_app_has_its_example_here() -> None:
    """A new command has to say what it must not load."""
    code = """
from inspector.cli.app import commands
print([command.name or command.callback.__name__ for command in commands.registered_commands])
"""
    names = set(json.loads(python(code).replace("'", '"')))
    assert names - {"app"} == {example[0] for example, _ in COMMANDS.values()}


@pytest.mark.parametrize("name", COMMANDS)
def test_a_command_loads_only_what_it_needs(name: str, tmp_path: Path) -> None:
    """No command but `app` loads the screen; reading and rating load neither the store nor the PDF library.

    Run with assertions and docstrings stripped: no command depends on either.
    """
    example, unwanted = COMMANDS[name]
    arguments = [part.format(folder=tmp_path) for part in example]
    code = f"""
import contextlib, io, sys
from inspector.cli.app import run
with contextlib.redirect_stdout(io.StringIO()):
    code = run({arguments!r})
print(code, sorted({unwanted!r} & set(sys.modules)))
"""
    assert python(code, "-OO").strip() == "0 []"


def test_no_figure_depends_on_assertions_or_docstrings() -> None:
    """With assertions and docstrings stripped the program gives the same rating to the last digit."""
    rate = ["-m", "inspector", "rate", SAMPLE, "--json", "-"]
    results = [
        subprocess.run([sys.executable, *options, *rate], cwd=ROOT, capture_output=True, check=True).stdout
        for options in ([], ["-OO"])
    ]
    assert json.loads(results[0])["bars"]
    assert results[0] == results[1]
