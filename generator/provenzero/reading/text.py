"""A file to its text: refused, with the place and the cure, where it cannot be text that a person wrote."""

import re
from pathlib import Path
from typing import Final

from provenzero.finding import Finding, Place

LARGEST_BYTES: Final = 1024 * 1024
_FORBIDDEN: Final = re.compile("[\x00-\x08\x0b\x0c\x0e-\x1f\x7f-\x84\x86-\x9f\ufffe\uffff]")
_UTF_16: Final = (b"\xff\xfe", b"\xfe\xff")


def read_text(path: Path) -> str | list[Finding]:
    """The text of a file in UTF-8 of at most 1 MiB without control characters; findings if it is not that."""
    file = str(path)
    try:
        with path.open("rb") as stream:
            content = stream.read(LARGEST_BYTES + 1)
    except FileNotFoundError:
        return [_finding(file, "no such file", "the path of a file that exists")]
    except IsADirectoryError:
        return [_finding(file, "a folder", "the path of a file")]
    except PermissionError:
        expected = "the path of a file" if path.is_dir() else "a file that you may read"
        return [_finding(file, "a folder" if path.is_dir() else "a file closed to you", expected)]
    except (OSError, ValueError) as error:
        reason = error.strerror if isinstance(error, OSError) and error.strerror else "not a path"
        return [_finding(file, f"a file that cannot be read ({reason})", "the path of a file that can be read")]
    if len(content) > LARGEST_BYTES:
        return [_finding(file, "more than 1 MiB", "a description of at most 1 MiB, as a person writes it")]
    return decoded(content, file)


def decoded(content: bytes, file: str) -> str | list[Finding]:
    """The text of bytes in UTF-8, with or without byte order mark; findings if they are not that."""
    if content.startswith(_UTF_16):
        return [_finding(file, "text in UTF-16", "the file saved as UTF-8", 1, 1)]
    try:
        text = content.decode("utf-8-sig")
    except UnicodeDecodeError as error:
        before = content[: error.start].decode("utf-8", errors="replace")
        line, column = _position(before)
        found = f"the byte 0x{content[error.start]:02x}, which is not UTF-8"
        return [_finding(file, found, "the file saved as UTF-8", line, column)]
    match = _FORBIDDEN.search(text)
    if match is not None:
        line, column = _position(text[: match.start()])
        found = f"the control character U+{ord(match[0]):04X}"
        return [_finding(file, found, "text without control characters: delete it there", line, column)]
    return text


def _position(before: str) -> tuple[int, int]:
    line = before.count("\n") + 1
    return line, len(before) - (before.rfind("\n") + 1) + 1


def _finding(file: str, found: str, expected: str, line: int | None = None, column: int | None = None) -> Finding:
    return Finding(place=Place(file=file, line=line, column=column), found=found, expected=expected)
