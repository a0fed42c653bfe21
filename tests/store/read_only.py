"""Try to open a store without the right to write it, and print what the program says. Run by itself."""

from __future__ import annotations

import os
import shutil
import sys
import tempfile
from pathlib import Path

from inspector.store import StoreError, open_store

NOBODY = 65534


def main() -> None:
    """Copy the store where anybody may read it and nobody may write it; root has to become somebody first."""
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder) / "store.db"
        shutil.copyfile(sys.argv[1], path)
        path.chmod(0o444)
        Path(folder).chmod(0o555)
        me = os.geteuid()
        if me == 0:
            os.seteuid(NOBODY)
        try:
            open_store(path).close()
            sys.stdout.write("opened")
        except StoreError as error:
            sys.stdout.write(str(error))
        finally:
            os.seteuid(me)
            Path(folder).chmod(0o755)


if __name__ == "__main__":
    main()
