"""Whole-file writes."""

from __future__ import annotations

import errno
import os
import stat
from pathlib import Path

import pytest

from navcore.files.store import read_bytes_capped, write_whole


def entries(folder: Path) -> list[str]:
    return sorted(path.name for path in folder.iterdir())


def test_a_new_file_is_written_whole(tmp_path: Path) -> None:
    write_whole(tmp_path / "plan.toml", b"legbook = 1\r\n\x00")
    assert (tmp_path / "plan.toml").read_bytes() == b"legbook = 1\r\n\x00"
    assert entries(tmp_path) == ["plan.toml"]


def test_an_old_file_is_replaced_and_keeps_its_permissions(tmp_path: Path) -> None:
    path = tmp_path / "plan.toml"
    path.write_bytes(b"old")
    path.chmod(0o640)
    write_whole(str(path), b"new")
    assert path.read_bytes() == b"new"
    assert stat.S_IMODE(path.stat().st_mode) == 0o640
    assert entries(tmp_path) == ["plan.toml"]


@pytest.mark.skipif(os.name != "posix", reason="links take rights elsewhere")
def test_a_link_stays_a_link_and_its_file_is_written(tmp_path: Path) -> None:
    (tmp_path / "real").mkdir()
    real = tmp_path / "real" / "plan.toml"
    real.write_bytes(b"old")
    link = tmp_path / "link.toml"
    link.symlink_to(real)
    write_whole(link, b"new")
    assert link.is_symlink()
    assert real.read_bytes() == b"new"
    assert entries(tmp_path) == ["link.toml", "real"]
    assert entries(tmp_path / "real") == ["plan.toml"]


@pytest.mark.skipif(os.name != "posix", reason="links take rights elsewhere")
def test_links_in_a_circle_are_an_error_of_the_system(tmp_path: Path) -> None:
    (tmp_path / "a").symlink_to(tmp_path / "b")
    (tmp_path / "b").symlink_to(tmp_path / "a")
    with pytest.raises(OSError, match=r"links|symbolic"):
        write_whole(tmp_path / "a", b"new")


@pytest.mark.parametrize("step", ["replace", "fsync", "fdopen"])
@pytest.mark.parametrize("error", [OSError(errno.ENOSPC, "no space left"), KeyboardInterrupt()])
@pytest.mark.parametrize("had_one", [True, False])
def test_where_any_step_fails_the_old_file_stays_and_the_new_one_goes(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, step: str, error: BaseException, had_one: bool
) -> None:
    path = tmp_path / "plan.toml"
    if had_one:
        path.write_bytes(b"old")

    def fail(*arguments: object) -> None:
        raise error

    monkeypatch.setattr(os, step, fail)
    with pytest.raises(type(error)):
        write_whole(path, b"new")
    monkeypatch.undo()
    assert entries(tmp_path) == (["plan.toml"] if had_one else [])
    assert not had_one or path.read_bytes() == b"old"


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="no full device here")
def test_a_device_is_written_to_and_never_replaced() -> None:
    with pytest.raises(OSError, match="space"):
        write_whole("/dev/full", b"new")
    assert Path("/dev/full").is_char_device()


def test_a_folder_and_a_missing_folder_are_errors_of_the_system(tmp_path: Path) -> None:
    with pytest.raises(FileNotFoundError):
        write_whole(tmp_path / "missing" / "plan.toml", b"new")
    (tmp_path / "plan").mkdir()
    with pytest.raises(OSError, match="plan"):  # which error depends on the system
        write_whole(tmp_path / "plan", b"new")
    assert entries(tmp_path) == ["plan"]


def test_a_file_that_may_not_be_written_is_left(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    path = tmp_path / "plan.toml"
    path.write_bytes(b"old")
    monkeypatch.setattr(os, "access", lambda target, mode: False)
    with pytest.raises(PermissionError, match="read-only"):
        write_whole(path, b"new")
    assert path.read_bytes() == b"old"


@pytest.mark.skipif(not hasattr(os, "geteuid") or os.geteuid() == 0, reason="the superuser may write anywhere")
def test_in_a_folder_that_may_not_be_written_nothing_changes(tmp_path: Path) -> None:
    path = tmp_path / "plan.toml"
    path.write_bytes(b"old")
    tmp_path.chmod(0o500)
    try:
        with pytest.raises(PermissionError):
            write_whole(path, b"new")
        assert path.read_bytes() == b"old"
        assert entries(tmp_path) == ["plan.toml"]
    finally:
        tmp_path.chmod(0o700)


def test_a_file_is_read_to_one_byte_past_the_cap(tmp_path: Path) -> None:
    path = tmp_path / "plan.toml"
    path.write_bytes(b"12345678")
    assert read_bytes_capped(path, 8) == b"12345678"
    assert read_bytes_capped(path, 4) == b"12345"
    with pytest.raises(FileNotFoundError):
        read_bytes_capped(tmp_path / "none", 4)
