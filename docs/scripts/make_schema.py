"""Write the JSON Schemas of the file formats beside this script. Run it after any change of a key."""

from __future__ import annotations

import json
from pathlib import Path

from inspector.exchange.schema import result_schema, site_schema

FILES = {
    "truss-footbridge-1.schema.json": site_schema,
    "truss-footbridge-rating-1.schema.json": result_schema,
}


def texts() -> dict[str, str]:
    """The text of each schema file, by file name."""
    return {name: json.dumps(build(), indent=1, ensure_ascii=False) + "\n" for name, build in FILES.items()}


if __name__ == "__main__":
    for name, text in texts().items():
        (Path(__file__).parents[1] / name).write_text(text, encoding="utf-8")
        print(name)
