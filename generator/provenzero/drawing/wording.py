"""The few words that stand on a drawing; a site may put its own in their place."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True, kw_only=True)
class Wording:
    """Words of the drawing. Those of the marks are short: they stand on the lines."""

    title: str = "Hydraulic circuit of {unit}"
    sheet: str = "Sheet {number} of {count}"
    opened: str = "OPENED"
    trapped: str = "TRAPPED"
    unknown: str = "PRESSURE?"
    open_to: str = "OPEN"
    to_tank: str = "TO TANK"
    to_air: str = "TO AIR"
    air: str = "AIR"
    rig_air: str = "RIG AIR"
    header: str = "accumulator header"
    returns: str = "return header"
    suction: str = "suction"
    pressure_line: str = "{name} line"
    line: str = "line"
    opening_line: str = "opening line"
    closing_line: str = "closing line"
    supply: str = "supply"
    opening: str = "O"
    closing: str = "C"
    legend_live: str = "under pressure"
    legend_zone: str = "opened, at zero"
    legend_dead: str = "at zero"
    legend_trapped: str = "trapped pressure"
    legend_unknown: str = "may hold pressure"
    legend_lock: str = "lock number"
    legend_vent: str = "locked open vent"
    legend_closed: str = "valve closed, open"
    legend_force: str = "valve position"
    legend_chambers: str = "closing, opening"
    alt_unit: str = (
        "Schematic of unit {unit}: {pumps} pumps, {banks} accumulator banks, {regulators} regulators, {functions} functions."
    )
    alt_sheet: str = "This is sheet {number} of {count}."
    alt_shown: str = "Shown here: {names}."
    alt_zone: str = "Opened lines, in a hatched band: {names}."
    alt_lock: str = "Lock {number} holds {device} in position {position}."
    alt_vent: str = "{device} stands open to {where}."
    alt_trapped: str = "Trapped pressure in: {names}."
    alt_unknown: str = "May hold pressure: {names}."
    alt_live: str = "Stay under pressure: {names}."
    alt_detail: str = "{device} in position {position}: {ways}."
    alt_joins: str = "{one} joined to {other}"
    alt_stops: str = "nothing passes"
    tank: str = "tank"
    atmosphere: str = "the air"


ENGLISH = Wording()
