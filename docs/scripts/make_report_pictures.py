"""Make the pictures of the PDF rating summary in docs/pictures/ from a sample.

Needs pdftoppm (on Debian: poppler-utils). Run it again after a change of the report:

    python docs/scripts/make_report_pictures.py
"""

from __future__ import annotations

import subprocess
import tempfile
from pathlib import Path

from inspector import desk, samples

PICTURES = Path(__file__).parents[1] / "pictures"
PAGES = {"report-result": 2, "report-elevation": 3, "report-hand-check": 6}
SAMPLE = "pratt-half-through"


def main() -> None:
    """Write one PNG a page."""
    PICTURES.mkdir(exist_ok=True)
    report = desk.report(desk.rate(samples.sample(SAMPLE)))
    with tempfile.TemporaryDirectory() as folder:
        pdf = Path(folder) / "report.pdf"
        pdf.write_bytes(report)
        for name, page in PAGES.items():
            command = ["pdftoppm", "-r", "70", "-f", str(page), "-l", str(page), "-singlefile", "-png", str(pdf)]
            subprocess.run([*command, str(PICTURES / name)], check=True)  # noqa: S603 (our own arguments)
            print(PICTURES / f"{name}.png")


if __name__ == "__main__":
    main()
