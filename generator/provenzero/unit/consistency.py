"""What a schema cannot see: references, tags used twice, pressures against each other, regulators in a ring."""

from collections.abc import Iterable, Iterator
from dataclasses import fields, is_dataclass

from provenzero.finding import Finding, Severity
from provenzero.reading.lines import Document
from provenzero.reading.nearest import nearest
from provenzero.unit.model import (
    ATMOSPHERE,
    HEADER,
    RESERVOIR,
    RETURNS,
    Bleed,
    Drive,
    Instrument,
    PanelKind,
    Pump,
    RegulatorControl,
    Relief,
    Unit,
    Valve,
)

PSI_PA = 6894.757293168
RELIEF_OVER_RATED = 1.1
RESERVED = (HEADER, RESERVOIR, RETURNS, ATMOSPHERE, "air", "unit")
Path = tuple[str | int, ...]


def faults(unit: Unit, document: Document) -> list[Finding]:
    """All faults of the circuit that a description draws, with their places."""
    checks = (_names, _tags, _references, _rings, _pressures, _pumps, _banks, _reservoir, _media, _returns)
    found: list[Finding] = []
    for check in checks:
        for path, seen, right, severity in check(unit):
            found.append(Finding(place=document.place(path), found=seen, expected=right, severity=severity))
    return found


_Fault = tuple[Path, str, str, Severity]


def _error(path: Path, seen: str, right: str) -> _Fault:
    return (path, seen, right, Severity.ERROR)


def _warning(path: Path, seen: str, right: str) -> _Fault:
    return (path, seen, right, Severity.WARNING)


def _lines(unit: Unit) -> list[str]:
    return [HEADER, *(r.serves for r in unit.regulators)]


def _names(unit: Unit) -> Iterator[_Fault]:
    seen: dict[str, str] = {}
    for i, item in enumerate(unit.functions):
        if item.name in seen or item.name in RESERVED:
            yield _error(("functions", i, "name"), f"the name {item.name} a second time", "a name of its own")
        seen[item.name] = "function"
    for i, regulator in enumerate(unit.regulators):
        if regulator.serves in seen and seen[regulator.serves] == "line":
            yield _error(
                ("regulators", i, "serves"),
                f"a second regulator on the line {regulator.serves}",
                "one regulator a line; two would work against each other",
            )
        elif regulator.serves in RESERVED or (regulator.serves in seen and regulator.serves != "annular"):
            yield _error(("regulators", i, "serves"), f"the name {regulator.serves}", "a name of its own")
        seen[regulator.serves] = "line"


def _tags(unit: Unit) -> Iterator[_Fault]:
    """Every tag once in the whole description, counted over all parts."""
    seen: set[str] = set()
    for path, part in _walk(unit):
        tag = getattr(part, "tag", None)
        if not isinstance(tag, str):
            continue
        key = tag.casefold()
        if key in seen:
            yield _error((*path, "tag"), f"the tag {tag} a second time", "each tag once")
        if key in RESERVED:
            yield _error((*path, "tag"), f"the tag {tag}", "a tag other than the names of lines")
        seen.add(key)


_SECTIONS = {"identity": "unit", "nitrogen_backups": "nitrogen_backup"}


def _walk(part: object, path: Path = ()) -> Iterator[tuple[Path, object]]:
    """Every piece of a unit with its path in the description."""
    if isinstance(part, tuple):
        for i, item in enumerate(part):
            yield from _walk(item, (*path, i))
    elif is_dataclass(part) and not isinstance(part, type):
        yield path, part
        for field in fields(part):
            if field.name == "header_fittings":
                where: Path = ("header", "fittings")
            elif isinstance(part, Bleed):
                where = path
            else:
                where = (*path, _SECTIONS.get(field.name, field.name))
            yield from _walk(getattr(part, field.name), where)


def _unknown(path: Path, word: str, known: Iterable[str], what: str) -> _Fault:
    words = list(known)
    near = nearest(word, words)
    hint = f"; did you mean {near}?" if near else ""
    return _error(path, f"{word}, which is no {what} here", f"one of {', '.join(words) or 'none at all'}{hint}")


def _references(unit: Unit) -> Iterator[_Fault]:
    """Every line, panel and regulator that is named must be one of the description."""
    lines = _lines(unit)
    chambers = [f"{f.name}.{side}" for f in unit.functions for side in ("open", "close")]
    for path, line in _named_lines(unit):
        if line not in lines:
            yield _unknown(path, line, lines, "pressure line")
    for i, bank in enumerate(unit.banks):
        if bank.attached_to not in [*lines, *chambers]:
            yield _unknown(("banks", i, "attached_to"), bank.attached_to, [*lines, *chambers], "line")
    panels = [p.tag for p in unit.panels]
    for i, item in enumerate(unit.functions):
        for k, tag in enumerate(item.valve.panels):
            if tag not in panels:
                yield _unknown(("functions", i, "valve", "panels", k), tag, panels, "panel")
    regulators = [r.tag for r in unit.regulators]
    for i, bypass in enumerate(unit.bypasses):
        if bypass.around not in regulators:
            yield _unknown(("bypasses", i, "around"), bypass.around, regulators, "regulator")
        if bypass.from_line == bypass.to_line:
            yield _error(("bypasses", i, "to"), f"a bypass from {bypass.to_line} to itself", "two different lines")


def _named_lines(unit: Unit) -> Iterator[tuple[Path, str]]:
    """Where the description names a pressure line, and the name."""
    for i, item in enumerate(unit.functions):
        yield ("functions", i, "fed_from"), item.fed_from
    for i, pump in enumerate(unit.pumps):
        yield ("pumps", i, "delivers_to"), pump.delivers_to
    for i, regulator in enumerate(unit.regulators):
        yield ("regulators", i, "fed_from"), regulator.fed_from
    for i, bypass in enumerate(unit.bypasses):
        yield ("bypasses", i, "from"), bypass.from_line
        yield ("bypasses", i, "to"), bypass.to_line
    for i, backup in enumerate(unit.nitrogen_backups):
        yield ("nitrogen_backup", i, "delivers_to"), backup.delivers_to


def _rings(unit: Unit) -> Iterator[_Fault]:
    feeds = {r.serves: r.fed_from for r in unit.regulators}
    for i, item in enumerate(unit.regulators):
        line, seen = item.serves, set()
        while line in feeds and line not in seen:
            seen.add(line)
            line = feeds[line]
        if line in seen:
            yield _error(
                ("regulators", i, "fed_from"),
                f"a ring of regulators through {line}",
                "a way that begins at the header",
            )


def _psi(pag: float) -> str:
    return f"{pag / PSI_PA:.0f} psi"


def _pressures(unit: Unit) -> Iterator[_Fault]:
    rated = unit.identity.rated_pressure_pag
    for i, item in enumerate(unit.regulators):
        if item.set_pressure_pag > rated:
            yield _error(
                ("regulators", i, "set_pressure"), _psi(item.set_pressure_pag), f"at most {_psi(rated)}, the rating"
            )
    for path, part in _walk(unit):
        opens = part.set_pressure_pag if isinstance(part, Relief) else None
        if opens is not None and opens > RELIEF_OVER_RATED * rated and path[0] not in {"air", "nitrogen_backup"}:
            yield _warning(
                (*path, "set_pressure"),
                f"a relief at {_psi(opens)}",
                f"at most 110 % of the rating, {_psi(RELIEF_OVER_RATED * rated)}",
            )
        scale = part.full_scale_pag if isinstance(part, Instrument) else None
        high = None if scale is None else _highest(unit, path)
        if scale is not None and high is not None and scale < high:
            yield _error(
                (*path, "full_scale"),
                f"a full scale of {_psi(scale)}",
                f"at least {_psi(high)}, the pressure of its line",
            )


def _highest(unit: Unit, path: Path) -> float | None:
    """The working pressure of the line that an instrument stands on; None where that is not one pressure."""
    stops = max((p.stop_pressure_pag for p in unit.pumps), default=0.0)
    if path[0] == "header":
        return stops
    if path[0] == "regulators" and path[2] == "fittings":
        return unit.regulators[int(path[1])].set_pressure_pag
    return None


def _pumps(unit: Unit) -> Iterator[_Fault]:
    rated = unit.identity.rated_pressure_pag
    for i, pump in enumerate(unit.pumps):
        start, stop = pump.start_pressure_pag, pump.stop_pressure_pag
        if start is not None and start >= stop:
            yield _error(
                ("pumps", i, "start_pressure"), f"a start at {_psi(start)}", f"less than the stop at {_psi(stop)}"
            )
        if stop > rated:
            yield _error(("pumps", i, "stop_pressure"), f"a stop at {_psi(stop)}", f"at most the rating, {_psi(rated)}")
        yield from _overpressure(i, pump)


def _overpressure(i: int, pump: Pump) -> Iterator[_Fault]:
    """Overpressure devices must not be isolatable from what they protect (API Std 53, 6.3.5.12)."""
    valve_before = False
    for k, element in enumerate(pump.discharge):
        if isinstance(element, Valve):
            valve_before = True
        if isinstance(element, Relief):
            if element.set_pressure_pag is not None and element.set_pressure_pag < pump.stop_pressure_pag:
                yield _error(
                    ("pumps", i, "discharge", k, "set_pressure"),
                    f"a relief at {_psi(element.set_pressure_pag)}",
                    f"more than the stop pressure, {_psi(pump.stop_pressure_pag)}",
                )
            if valve_before:
                yield _warning(
                    ("pumps", i, "discharge", k),
                    f"the relief {element.tag} behind a shut-off valve",
                    "a relief that no valve can part from its pump",
                )


def _banks(unit: Unit) -> Iterator[_Fault]:
    floor = min((p.start_pressure_pag or p.stop_pressure_pag for p in unit.pumps), default=None)
    for i, bank in enumerate(unit.banks):
        if bank.bottle_valves and len(bank.bottle_valves) != bank.bottles:
            yield _error(
                ("banks", i, "bottle_valves"),
                f"{len(bank.bottle_valves)} bottle valves for {bank.bottles} bottles",
                "one valve a bottle, or none",
            )
        if bank.precharge_pag is not None and floor is not None and bank.precharge_pag >= floor:
            yield _error(
                ("banks", i, "precharge", "pressure"),
                f"a precharge of {_psi(bank.precharge_pag)}",
                f"less than the lowest pressure in service, {_psi(floor)}",
            )


def _reservoir(unit: Unit) -> Iterator[_Fault]:
    volume, fluid = unit.reservoir.volume_m3, unit.reservoir.fluid_volume_m3
    if volume is not None and fluid is not None and fluid > volume:
        yield _error(("reservoir", "fluid_volume"), "more fluid than the tank holds", "at most the volume of the tank")
    if unit.ambient_low_k > unit.ambient_high_k:
        yield _error(("ambient", "low"), "a low above the high", "the colder one first")


def _media(unit: Unit) -> Iterator[_Fault]:
    needs: list[tuple[Path, str]] = [
        (("pumps", i, "drive"), "an air pump") for i, p in enumerate(unit.pumps) if p.drive is Drive.AIR
    ]
    needs += [
        (("panels", i, "kind"), "a panel that works with air")
        for i, p in enumerate(unit.panels)
        if p.kind is PanelKind.PNEUMATIC or p.through_pilot_air
    ]
    needs += [
        (("regulators", i, "control"), "an air-operated regulator")
        for i, r in enumerate(unit.regulators)
        if r.control is RegulatorControl.AIR
    ]
    if unit.air is None:
        for path, what in needs:
            yield _error(path, f"{what} on a unit without air", "the air supply under `air`")


def _returns(unit: Unit) -> Iterator[_Fault]:
    for path, part in _walk(unit):
        if isinstance(part, (Bleed, Relief)) and part.to == RETURNS and not unit.common_returns:
            yield _error((*path, "to"), "returns, on a unit without a common return header", "reservoir or atmosphere")
