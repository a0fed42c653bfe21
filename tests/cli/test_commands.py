"""The commands as a person at a terminal meets them: what they print, where, and with which exit code."""

from __future__ import annotations

import json
import os
import re
import subprocess
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest
from pypdf import PdfReader

from inspector import desk
from inspector.cli import app
from models.resistance import LRFR, registry
from models.words import CAUTION, significant

ROOT = Path(__file__).parents[2]
SITES = ROOT / "sample_sites"
PRATT = str(SITES / "pratt-half-through.json")

Told = tuple[int, str, str]


@pytest.fixture
def inspector(capsys: pytest.CaptureFixture[str]) -> Callable[..., Told]:
    """Run a command; exit code, standard output, standard error."""

    def run(*arguments: str) -> Told:
        code = app.run(arguments)
        said = capsys.readouterr()
        return code, said.out, said.err

    return run


def site_with(tmp_path: Path, **changes: Any) -> str:
    """A copy of a sample with some of its rating rules changed."""
    document = json.loads(Path(PRATT).read_text(encoding="utf-8"))
    document["rating"] |= changes
    path = tmp_path / "site.json"
    path.write_text(json.dumps(document), encoding="utf-8")
    return str(path)


def flat(text: str) -> str:
    """Text without line breaks, as a reader takes it in."""
    return re.sub(r"\s+", " ", text)


@pytest.mark.parametrize("site", sorted(SITES.glob("*.json")), ids=lambda path: path.stem)
def test_rate_prints_every_bar_under_the_caution_within_100_columns(site: Path, inspector: Callable[..., Told]) -> None:
    """A rating opens with the caution, names every bar, and never runs past the hundredth column."""
    code, out, _ = inspector("rate", str(site))
    assert code == 0
    assert flat(out).startswith(CAUTION)
    assert max(map(len, out.splitlines())) <= 100
    document = json.loads(site.read_text(encoding="utf-8"))
    for truss in document["trusses"].values():
        for bar in truss.get("bars", ()):
            assert re.search(rf"^ {re.escape(bar['id'])} ", out, re.MULTILINE), bar["id"]


def test_json_to_standard_output_is_the_result_and_nothing_else(inspector: Callable[..., Told]) -> None:
    """What `--json -` prints is one JSON document that another program can read."""
    code, out, err = inspector("rate", PRATT, "--json", "-")
    assert (code, err) == (0, "")
    found = json.loads(out)
    assert found["format"] == "truss-footbridge-rating/1"
    assert found["caution"] == CAUTION


def test_json_to_a_file_stands_beside_the_table(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """With a file name the table is printed as well, and the file holds the same lowest rating factor."""
    target = tmp_path / "result.json"
    code, out, _ = inspector("rate", PRATT, "--json", str(target))
    lowest = json.loads(target.read_text(encoding="utf-8"))["structure"]["rating factor"]["operating"]
    assert code == 0
    assert f"operating {lowest:.2f}" in flat(out)


def test_check_names_what_it_read_and_claims_nothing(inspector: Callable[..., Told]) -> None:
    """A good file is counted, and the sentence says that this tells nothing about the bridge."""
    code, out, _ = inspector("check", PRATT)
    assert code == 0
    assert "2 trusses, 58 bars, 2 visits" in out
    assert "says nothing about the bridge" in flat(out)


def test_check_accepts_a_basis_that_rate_and_report_cannot_use_yet(
    tmp_path: Path, inspector: Callable[..., Told], monkeypatch: pytest.MonkeyPatch
) -> None:
    """A site on a basis that is not built can be checked; rating it ends with 2 and names the bases that there are."""
    monkeypatch.setattr(registry, "BASES", {"lrfr": LRFR})
    site = site_with(tmp_path, basis="eurocode")
    assert inspector("check", site)[0] == 0
    for command in (
        ["rate", site],
        ["report", site, "-o", str(tmp_path / "no.pdf")],
        ["explain", site, "upstream/L0-L1"],
    ):
        code, out, err = inspector(*command)
        assert code == 2
        assert "eurocode" in err
        assert "`lrfr`" in err
        assert out == ""
    assert not (tmp_path / "no.pdf").exists()


def test_every_mistake_in_a_file_is_named_with_its_path(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """Two mistakes give two lines and exit code 2."""
    site = site_with(tmp_path, connection_allowance=1.1, system="gold")
    code, out, err = inspector("rate", site)
    assert code == 2
    assert out == ""
    assert "2 problems; nothing was stored" in err
    assert "rating/connection_allowance" in err
    assert "rating/system" in err


@pytest.mark.parametrize("command", [["check"], ["rate"], ["explain"], ["report"]])
def test_a_file_that_is_not_there_is_wrong_input(command: list[str], inspector: Callable[..., Told]) -> None:
    """A missing file ends with 2 and names itself."""
    more = {"explain": ["a/b"], "report": ["-o", "x.pdf"]}.get(command[0], [])
    code, _, err = inspector(*command, "nowhere.json", *more)
    assert code == 2
    assert "nowhere.json" in err


def test_unknown_options_and_missing_arguments_end_with_2(inspector: Callable[..., Told]) -> None:
    """What the command line itself cannot read is wrong input too."""
    assert inspector("rate")[0] == 2
    assert inspector("rate", PRATT, "--colour")[0] == 2
    assert inspector("sing")[0] == 2


def test_explain_prints_the_calculation_of_one_bar(inspector: Callable[..., Told]) -> None:
    """The hand check shows the resistance, its clause, and the rating factor that the table has."""
    code, out, _ = inspector("explain", PRATT, "upstream/L0-L1")
    rated = desk.rate(desk.check(Path(PRATT)))
    factor = next(bar for bar in rated.rating.bars if (bar.truss, bar.bar) == ("upstream", "L0-L1")).rating_factor
    assert code == 0
    assert "AASHTO LRFD 6.8.2.1" in out
    assert f"= {factor['operating']:.4f}" in out
    assert max(map(len, out.splitlines())) <= 100


@pytest.mark.parametrize("name", sorted(registry.BASES))
def test_each_basis_prints_its_levels_and_its_hand_check(
    name: str, tmp_path: Path, inspector: Callable[..., Told]
) -> None:
    """The table has a column a level, and the hand check ends at the factors of the table at every level."""
    path = site_with(tmp_path, basis=name)
    code, out, _ = inspector("rate", path)
    rated = desk.rate(desk.check(Path(path)))
    row = next(bar for bar in rated.rating.bars if (bar.truss, bar.bar) == ("upstream", "L0-L1"))
    assert code == 0
    assert max(map(len, out.splitlines())) <= 100
    assert re.search(rf"^ bar +known +state +{' +'.join(rated.rating.levels)} +check", out, re.MULTILINE)
    code, out, _ = inspector("explain", path, "upstream/L0-L1")
    assert (code, max(map(len, out.splitlines())) <= 100) == (0, True)
    for level in rated.rating.levels:
        factor = row.rating_factor[level]
        assert f"RF {level} = " in out
        assert f"= {significant(factor or 0.0, 5).rstrip('0')}" in out


def test_explain_shows_the_capacity_of_both_levels_where_they_differ(
    tmp_path: Path, inspector: Callable[..., Told]
) -> None:
    """By allowable stresses there is a capacity for each level; by load factors one for both."""
    _, out, _ = inspector("explain", site_with(tmp_path, basis="allowable stress"), "upstream/L0-L1")
    assert re.findall(r"^  (C(?: [a-z]+)?) =", out, re.MULTILINE) == ["C inventory", "C operating"]
    _, out, _ = inspector("explain", PRATT, "upstream/L0-L1")
    assert re.findall(r"^  (C(?: [a-z]+)?) =", out, re.MULTILINE) == ["C"]


@pytest.mark.parametrize(
    ("place", "told"), [("upstream/L9-L10", "has no bar"), ("left/L0-L1", "no such truss"), ("L0", "TRUSS/BAR")]
)
def test_explain_names_what_there_is_when_the_bar_is_not(place: str, told: str, inspector: Callable[..., Told]) -> None:
    """A wrong place ends with 2 and says what could stand there."""
    code, _, err = inspector("explain", PRATT, place)
    assert code == 2
    assert told in err


def test_report_writes_a_pdf_that_names_the_bridge(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """The report can be read back and carries the bridge's name."""
    target = tmp_path / "report.pdf"
    code, out, _ = inspector("report", PRATT, "-o", str(target))
    assert code == 0
    assert "preliminary" in out
    assert "Ellerwick Mill footbridge" in PdfReader(target).pages[0].extract_text()


def test_a_folder_that_cannot_be_written_to_ends_with_1(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """Where the report cannot be written the place is named, and no traceback appears."""
    code, _, err = inspector("report", PRATT, "-o", str(tmp_path / "missing" / "report.pdf"))
    assert code == 1
    assert "missing" in err
    assert "Traceback" not in err


def test_demo_logs_a_visit_and_leaves_store_result_and_report(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """The demo shows figures before and after an entry, and its three files agree with a plain rating."""
    code, out, _ = inspector("demo", "--folder", str(tmp_path))
    assert code == 0
    assert re.search(r"upstream/L0-L1 .*\d\.\d+ > \d\.\d+ .*\d\.\d+ > \d\.\d+", out)
    assert max(len(line) for line in out.splitlines() if str(tmp_path) not in line) <= 100
    assert {path.suffix for path in tmp_path.iterdir()} == {".sqlite", ".json", ".pdf"}
    result = json.loads((tmp_path / "pratt-half-through-rating.json").read_text(encoding="utf-8"))
    assert result == json.loads(desk.result_text(desk.rate(desk.check(Path(PRATT)))))


def test_demo_starts_anew_in_its_own_folder(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """A second demo in the same folder gives the same result and report, byte for byte."""
    first = {}
    for turn in range(2):
        assert inspector("demo", "--sample", "severed-hanger", "--folder", str(tmp_path))[0] == 0
        made = {path.name: path.read_bytes() for path in tmp_path.iterdir() if path.suffix != ".sqlite"}
        first = made if turn == 0 else first
        assert made == first


def test_demo_names_the_samples_that_there_are(tmp_path: Path, inspector: Callable[..., Told]) -> None:
    """An unknown sample ends with 2 and lists the known ones."""
    code, _, err = inspector("demo", "--sample", "no-such-bridge", "--folder", str(tmp_path))
    assert code == 2
    assert "warren-feet-and-kips" in err


def test_a_fault_of_the_program_is_kept_and_told_without_a_traceback(
    inspector: Callable[..., Told], monkeypatch: pytest.MonkeyPatch
) -> None:
    """An error that nobody foresaw ends with 1, names a file that holds the details, and prints no traceback."""

    def broken(_: Path) -> None:
        raise ZeroDivisionError("on purpose")

    monkeypatch.setattr(desk, "check", broken)
    code, _, err = inspector("check", PRATT)
    kept = re.search(r"\S+inspector-fault-\S+\.txt", err)
    assert code == 1
    assert "Traceback" not in err
    assert kept is not None
    details = Path(kept.group())
    assert "ZeroDivisionError: on purpose" in details.read_text(encoding="utf-8")
    details.unlink()


def test_a_reader_that_closes_the_pipe_causes_no_noise() -> None:
    """`inspector rate SITE | head -1` prints no traceback."""
    command = f"{sys.executable} -m inspector rate {PRATT} | head -n 1"
    found = subprocess.run(
        ["bash", "-c", command],
        capture_output=True,
        text=True,
        cwd=ROOT,
        env={**os.environ, "PYTHONPATH": str(ROOT)},
        check=False,
    )
    assert found.stderr == ""


@pytest.mark.parametrize("command", ["demo", "check", "rate", "explain", "report"])
def test_every_command_tells_what_it_does(command: str, inspector: Callable[..., Told]) -> None:
    """Help is there for every command, and the list of commands names it."""
    code, out, _ = inspector(command, "--help")
    assert code == 0
    assert "Usage" in out
    assert command in inspector("--help")[1]


def test_no_text_of_the_command_line_claims_too_much(inspector: Callable[..., Told]) -> None:
    """No output says that a bridge is safe, passes or is certified."""
    texts = [inspector(*command)[1] for command in (["rate", PRATT], ["explain", PRATT, "upstream/L0-L1"], ["--help"])]
    for text in texts:
        assert re.search(r"\b(safe|safely|passes|passed|certified|OK)\b", text) is None
