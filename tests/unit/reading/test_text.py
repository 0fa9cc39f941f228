"""A file is read as text, or refused with the place and the cure."""

import os
from pathlib import Path

import pytest

from provenzero.finding import Finding
from provenzero.reading.text import LARGEST_BYTES, read_text


def refused(content: bytes, folder: Path) -> Finding:
    file = folder / "rig.yaml"
    file.write_bytes(content)
    outcome = read_text(file)
    assert isinstance(outcome, list)
    assert len(outcome) == 1
    assert outcome[0].place.file == str(file)
    return outcome[0]


def test_text_in_utf_8_is_read_with_and_without_a_byte_order_mark(tmp_path: Path) -> None:
    for mark in (b"", b"\xef\xbb\xbf"):
        (tmp_path / "rig.yaml").write_bytes(mark + "unit: Ölfeld\r\n".encode())
        assert read_text(tmp_path / "rig.yaml") == "unit: Ölfeld\r\n"


def test_a_missing_file_is_a_finding(tmp_path: Path) -> None:
    outcome = read_text(tmp_path / "none.yaml")
    assert isinstance(outcome, list)
    assert outcome[0].found == "no such file"


def test_a_folder_is_a_finding(tmp_path: Path) -> None:
    outcome = read_text(tmp_path)
    assert isinstance(outcome, list)
    assert outcome[0].found == "a folder"


def test_a_path_through_a_file_is_a_finding(tmp_path: Path) -> None:
    (tmp_path / "rig.yaml").write_text("unit: A\n")
    outcome = read_text(tmp_path / "rig.yaml" / "more.yaml")
    assert isinstance(outcome, list)
    assert "cannot be read" in outcome[0].found


@pytest.mark.skipif(not hasattr(os, "geteuid") or os.geteuid() == 0, reason="nothing is closed to this user")
def test_a_file_closed_to_the_reader_is_a_finding(tmp_path: Path) -> None:
    (tmp_path / "rig.yaml").write_text("unit: A\n")
    (tmp_path / "rig.yaml").chmod(0)
    outcome = read_text(tmp_path / "rig.yaml")
    assert isinstance(outcome, list)
    assert outcome[0].found == "a file closed to you"


def test_a_file_closed_by_the_system_is_a_finding(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def closed(*_: object, **__: object) -> None:
        raise PermissionError

    monkeypatch.setattr(Path, "open", closed)
    outcome = read_text(tmp_path / "rig.yaml")
    assert isinstance(outcome, list)
    assert outcome[0].found == "a file closed to you"


def test_a_name_that_no_file_can_have_is_a_finding() -> None:
    outcome = read_text(Path("rig\0.yaml"))
    assert isinstance(outcome, list)
    assert "cannot be read" in outcome[0].found


def test_more_than_a_mebibyte_is_refused_and_a_mebibyte_is_read(tmp_path: Path) -> None:
    assert "1 MiB" in refused(b"#" * (LARGEST_BYTES + 1), tmp_path).expected
    (tmp_path / "rig.yaml").write_bytes(b"#" * LARGEST_BYTES)
    assert read_text(tmp_path / "rig.yaml") == "#" * LARGEST_BYTES


def test_bytes_that_are_not_utf_8_are_refused_where_they_stand(tmp_path: Path) -> None:
    finding = refused("unit: A\nfluid: Öl\n".encode("latin-1"), tmp_path)
    assert (finding.place.line, finding.place.column) == (2, 8)
    assert "0xd6" in finding.found
    assert "UTF-8" in finding.expected


@pytest.mark.parametrize("encoding", ["utf-16", "utf-16-be"])
def test_utf_16_is_refused_by_name_when_marked(tmp_path: Path, encoding: str) -> None:
    mark = b"" if encoding == "utf-16" else b"\xfe\xff"
    assert refused(mark + "unit: A\n".encode(encoding), tmp_path).found == "text in UTF-16"


@pytest.mark.parametrize("character", ["\0", "\x07", "\x1b", "\x7f", "\uffff"])
def test_a_control_character_is_refused_where_it_stands(tmp_path: Path, character: str) -> None:
    finding = refused(f"unit: A\nname: B{character}\n".encode(), tmp_path)
    assert (finding.place.line, finding.place.column) == (2, 8)
    assert f"U+{ord(character):04X}" in finding.found
