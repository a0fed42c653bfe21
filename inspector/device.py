"""Where the data of this device lies, and the id by which its entries are told from another tablet's."""

from __future__ import annotations

import os
import secrets
import string
from pathlib import Path
from typing import Final

from platformdirs import user_data_path

from models.errors import InspectorError

NAME: Final = "truss-footbridge-inspector"
STORE: Final = "footbridges.db"
IDENTITY: Final = "device-id"

_LENGTH: Final = 8


class DeviceError(InspectorError):
    """The device does not let the program keep its data."""


def data_directory() -> Path:
    """The user's folder for the data of this program; made if it is not there.

    Raises
    ------
    DeviceError
        If it cannot be made.
    """
    path = user_data_path(NAME, appauthor=False)
    try:
        path.mkdir(parents=True, exist_ok=True)
    except OSError as error:
        raise DeviceError(
            f"{path} cannot be made ({error.strerror}). Allow writing there, or give the path of a store with --store."
        ) from error
    return path


def store_path(given: Path | None = None) -> Path:
    """The path of the store: the one that was given, else the one in the user's folder."""
    return data_directory() / STORE if given is None else given


def device_id(directory: Path) -> str:
    """The id of this device, eight characters; made at random the first time and kept in ``directory``.

    Two programs that start at the same moment get the same id, and a crash leaves a whole id or none.

    Raises
    ------
    DeviceError
        If it cannot be read or kept: without it entries of two tablets could be taken for one's.
    """
    path = directory / IDENTITY
    try:
        return _kept(path) or _keep(path, secrets.token_hex(_LENGTH // 2))
    except OSError as error:
        raise DeviceError(
            f"{path} cannot be read or written ({error.strerror}). Allow reading and writing in {directory}."
        ) from error


def _kept(path: Path) -> str | None:
    """The id in the file; None where there is no file, or no id in it."""
    try:
        text = path.read_text(encoding="ascii", errors="replace").strip()
    except FileNotFoundError:
        return None
    return text if len(text) == _LENGTH and set(text) <= set(string.hexdigits) else None


def _keep(path: Path, made: str) -> str:
    """Put the id into place whole, unless another program was faster; return the one that is in place."""
    draft = path.with_name(f"{path.name}.{made}")
    with draft.open("w", encoding="ascii") as file:
        file.write(made)
        file.flush()
        os.fsync(file.fileno())
    try:
        os.link(draft, path)
    except OSError:
        # There already, whole or spoilt; or a file system without links.
        found = _kept(path)
        if found is not None:
            draft.unlink()
            return found
        draft.replace(path)
        return made
    draft.unlink()
    return made
