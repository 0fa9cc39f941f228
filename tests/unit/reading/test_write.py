"""A file is written whole or not at all."""

import errno
import os
from pathlib import Path

import pytest

from provenzero.reading.write import write_atomically


def test_the_bytes_are_written_and_nothing_else_is_left(tmp_path: Path) -> None:
    assert write_atomically(tmp_path / "permit.pdf", b"\0\r\n\xff") is None
    assert (tmp_path / "permit.pdf").read_bytes() == b"\0\r\n\xff"
    assert [p.name for p in tmp_path.iterdir()] == ["permit.pdf"]


def test_an_older_file_is_replaced_and_keeps_its_mode(tmp_path: Path) -> None:
    file = tmp_path / "permit.html"
    file.write_bytes(b"old and longer than the new one")
    file.chmod(0o640)
    assert write_atomically(file, b"new") is None
    assert file.read_bytes() == b"new"
    assert file.stat().st_mode & 0o777 == 0o640


def test_a_link_stays_a_link_to_the_new_file(tmp_path: Path) -> None:
    (tmp_path / "real.html").write_bytes(b"old")
    (tmp_path / "link.html").symlink_to("real.html")
    assert write_atomically(tmp_path / "link.html", b"new") is None
    assert (tmp_path / "link.html").is_symlink()
    assert (tmp_path / "real.html").read_bytes() == b"new"


def test_a_part_that_a_crash_left_behind_is_no_hindrance(tmp_path: Path) -> None:
    (tmp_path / f".part-{os.getpid()}-0").write_bytes(b"left behind")
    assert write_atomically(tmp_path / "permit.json", b"{}") is None
    assert (tmp_path / "permit.json").read_bytes() == b"{}"


def test_a_missing_folder_is_a_finding(tmp_path: Path) -> None:
    finding = write_atomically(tmp_path / "none" / "permit.pdf", b"x")
    assert finding is not None
    assert finding.found == f"no folder {tmp_path / 'none'}"
    assert finding.place.file == str(tmp_path / "none" / "permit.pdf")


def test_a_folder_in_place_of_the_file_is_a_finding(tmp_path: Path) -> None:
    (tmp_path / "permit.pdf").mkdir()
    finding = write_atomically(tmp_path / "permit.pdf", b"x")
    assert finding is not None
    assert finding.found == "a folder of that name"


def test_a_file_in_place_of_the_folder_is_a_finding(tmp_path: Path) -> None:
    (tmp_path / "out").write_bytes(b"a file")
    finding = write_atomically(tmp_path / "out" / "permit.pdf", b"x")
    assert finding is not None
    assert "no folder" in finding.found


@pytest.mark.parametrize("name", ["x" * 300, "nul\0.pdf"])
def test_a_name_that_no_file_can_have_is_a_finding(name: str, tmp_path: Path) -> None:
    finding = write_atomically(tmp_path / name, b"x")
    assert finding is not None
    assert finding.expected == "another path"
    assert list(tmp_path.iterdir()) == []


@pytest.mark.parametrize(
    ("code", "found"),
    [
        (errno.ENOSPC, "a full disk; nothing was written"),
        (errno.EACCES, "closed to you"),
        (errno.EROFS, "a read-only disk"),
        (errno.EIO, "cannot be written"),
    ],
)
@pytest.mark.parametrize("step", ["fsync", "replace"])
def test_a_disk_that_fails_leaves_the_old_file_and_nothing_beside_it(
    code: int, found: str, step: str, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    file = tmp_path / "permit.pdf"
    file.write_bytes(b"old")

    def fails(*_: object) -> None:
        raise OSError(code, os.strerror(code))

    monkeypatch.setattr(os, step, fails)
    finding = write_atomically(file, b"new")
    assert finding is not None
    assert found in finding.found
    assert file.read_bytes() == b"old"
    assert [p.name for p in tmp_path.iterdir()] == ["permit.pdf"]


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="the system has no disk that is always full")
def test_a_device_that_is_full_is_a_finding(monkeypatch: pytest.MonkeyPatch, tmp_path: Path) -> None:
    real = Path.open

    def onto_the_full_device(self: Path, mode: str = "r") -> object:
        return real(Path("/dev/full") if mode == "r+b" else self, mode)

    monkeypatch.setattr(Path, "open", onto_the_full_device)
    finding = write_atomically(tmp_path / "permit.pdf", b"x" * 100_000)
    assert finding is not None
    assert finding.found == "a full disk; nothing was written"
    assert finding.expected == f"room for 100000 bytes in {tmp_path}"
    assert list(tmp_path.iterdir()) == []
