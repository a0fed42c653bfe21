"""Where this device keeps its data, and the id by which it signs entries."""

from __future__ import annotations

import threading
from pathlib import Path

import pytest

from inspector import device


def test_the_id_is_made_once_and_kept(tmp_path: Path) -> None:
    """The id of a device does not change, and no draft of it is left behind."""
    first = device.device_id(tmp_path)
    assert device.device_id(tmp_path) == first
    assert len(first) == 8
    assert [path.name for path in tmp_path.iterdir()] == [device.IDENTITY]


def test_two_devices_have_two_ids(tmp_path: Path) -> None:
    """Two folders stand for two devices."""
    for name in "ab":
        (tmp_path / name).mkdir()
    assert device.device_id(tmp_path / "a") != device.device_id(tmp_path / "b")


def test_programs_that_start_together_get_one_id(tmp_path: Path) -> None:
    """However many ask at the same moment for the first time, all get the id that is kept."""
    found: list[str] = []
    together = threading.Barrier(8)

    def ask() -> None:
        together.wait()
        found.append(device.device_id(tmp_path))

    askers = [threading.Thread(target=ask) for _ in range(8)]
    for asker in askers:
        asker.start()
    for asker in askers:
        asker.join()
    assert set(found) == {device.device_id(tmp_path)}
    assert len(found) == 8


@pytest.mark.parametrize("spoilt", ["", "abc", "not an id at all", "ÿÿÿÿÿÿÿÿ"])
def test_a_spoilt_id_is_made_anew(tmp_path: Path, spoilt: str) -> None:
    """An empty or spoilt file is no id; a new one is put in its place whole."""
    (tmp_path / device.IDENTITY).write_text(spoilt, encoding="utf-8")
    made = device.device_id(tmp_path)
    assert len(made) == 8
    assert device.device_id(tmp_path) == made


def test_an_id_is_kept_where_the_file_system_has_no_links(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """A memory card without hard links keeps an id all the same."""

    def no_link(*_: object) -> None:
        raise PermissionError(1, "no links here")

    monkeypatch.setattr("os.link", no_link)
    made = device.device_id(tmp_path)
    assert device.device_id(tmp_path) == made
    assert [path.name for path in tmp_path.iterdir()] == [device.IDENTITY]


def test_a_folder_that_is_not_there_is_named(tmp_path: Path) -> None:
    """What cannot be kept is said, with the path."""
    with pytest.raises(device.DeviceError, match=r"nowhere.*cannot be read or written"):
        device.device_id(tmp_path / "nowhere")


def test_data_lies_in_the_users_folder_unless_a_path_is_given(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """The folder is made the first time; a given path is taken as it is."""
    monkeypatch.setattr(device, "user_data_path", lambda *_, **__: tmp_path / "data" / device.NAME)
    assert device.store_path() == tmp_path / "data" / device.NAME / device.STORE
    assert (tmp_path / "data" / device.NAME).is_dir()
    assert device.store_path(Path("mine.db")) == Path("mine.db")


def test_a_folder_that_cannot_be_made_is_named(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    """A user's folder that cannot be made is said, with the way round it."""
    (tmp_path / "file").touch()
    monkeypatch.setattr(device, "user_data_path", lambda *_, **__: tmp_path / "file" / "data")
    with pytest.raises(device.DeviceError, match=r"cannot be made .* --store"):
        device.data_directory()
