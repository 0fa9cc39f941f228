"""The readings a plan promises, held against the pressures that its own network comes to."""

from collections.abc import Iterator, Mapping
from typing import Any

from tests.properties.oracle_parts.circuit import CannotJudgeError, Circuit
from tests.properties.oracle_parts.spread import Pressures
from tests.properties.oracle_parts.walk import Walk

ROUNDING_PA = 1.0
LOW_BAND_FRACTION = 0.1  # of the highest pressure in the same medium; a band from zero to less reads as zero


def untrue_readings(walked: Walk) -> Iterator[str]:
    """Every promise that the circuit may break, and every zero that is not one."""
    circuit = walked.circuit
    highest = _highest(circuit, walked.start.pressures)
    for moment in walked.moments:
        pressures = moment.after.pressures
        for reading in moment.step.get("expect") or ():
            line = _line(circuit, reading)
            least, most = float(reading["low_pag"]), float(reading["high_pag"])
            margin = ROUNDING_PA + float(reading.get("tolerance_pa") or 0.0)
            said = f"{moment.name} promises [{least:.0f}, {most:.0f}] Pa on {reading['gauge']}"
            low, high = pressures.low[line], pressures.high[line]
            if least <= 0 and most <= LOW_BAND_FRACTION * highest[circuit.medium[line]]:
                if high > circuit.head_pag[line] + ROUNDING_PA:
                    yield f"{said}, which reads as zero, and {circuit.ids[line]} is at {pressures.text(line)}"
            elif low < least - margin or high > most + margin:
                yield f"{said}, and {circuit.ids[line]} is at {pressures.text(line)}"


def _line(circuit: Circuit, reading: Mapping[str, Any]) -> int:
    if "line" not in reading:
        raise CannotJudgeError(f"the reading on {reading['gauge']} doesn't say on which line")
    return circuit.line(reading["line"])


def _highest(circuit: Circuit, pressures: Pressures) -> Mapping[str, float]:
    """The highest pressure of each medium in normal service [Pa gauge]."""
    highest: dict[str, float] = {}
    for line, medium in enumerate(circuit.medium):
        highest[medium] = max(highest.get(medium, 0.0), pressures.high[line])
    return highest
