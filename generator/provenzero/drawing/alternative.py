"""The drawing in words, for somebody who cannot see it."""

from collections.abc import Sequence

from provenzero.drawing.marks import Vent
from provenzero.drawing.model import Role
from provenzero.drawing.scene import Scene


def title(scene: Scene, number: int, count: int) -> str:
    """The title of a sheet."""
    words = scene.wording
    name = words.title.format(unit=scene.unit.identity.tag)
    return name if count == 1 else f"{name}, {words.sheet.format(number=number, count=count)}"


def alternative(scene: Scene, number: int, count: int, shown: Sequence[str]) -> str:
    """What a sheet shows, what is opened, locked, vented, trapped and live."""
    words, unit, marks = scene.wording, scene.unit, scene.marks
    parts = [
        words.alt_unit.format(
            unit=unit.identity.tag,
            pumps=len(unit.pumps),
            banks=len(unit.banks),
            regulators=len(unit.regulators),
            functions=len(unit.functions),
        )
    ]
    if count > 1:
        parts += [words.alt_sheet.format(number=number, count=count), words.alt_shown.format(names=", ".join(shown))]
    told = ((Role.ZONE, words.alt_zone), (Role.TRAPPED, words.alt_trapped), (Role.UNKNOWN, words.alt_unknown))
    parts += _named(scene, Role.ZONE, told[0][1])
    for tag, lock in sorted(marks.locks.items(), key=lambda item: item[1]):
        parts.append(words.alt_lock.format(number=lock, device=tag, position=scene.position(tag)))
    for tag, where in marks.open_vents.items():
        place = words.tank if where is Vent.TANK else words.atmosphere
        parts.append(words.alt_vent.format(device=tag, where=place))
    for role, pattern in (*told[1:], (Role.LIVE, words.alt_live)):
        parts += _named(scene, role, pattern)
    return " ".join(parts)


def _named(scene: Scene, role: Role, pattern: str) -> list[str]:
    names = [line.name for key, line in scene.lines.items() if scene.marks.role(key) is role]
    return [pattern.format(names=", ".join(names))] if names else []
