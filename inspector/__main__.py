"""The program's entry: `inspector`, or `python -m inspector`."""

from __future__ import annotations

import sys

from inspector.cli.app import run


def main() -> None:
    """Run the command line and leave with its exit code."""
    sys.exit(run(sys.argv[1:]))


if __name__ == "__main__":
    main()
