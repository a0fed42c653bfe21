"""The PDF rating summary."""

from __future__ import annotations

from inspector.report.document import make_report
from inspector.report.result_page import GOVERNING, lowest_bars

__all__ = ["GOVERNING", "lowest_bars", "make_report"]
