"""SI figures and bands in the words of the paper: units of the site, not known where nothing is known."""

from collections.abc import Callable
from dataclasses import dataclass

from provenzero.document.context import PrintUnits
from provenzero.document.figures import Band
from provenzero.document.wording import Wording


@dataclass(frozen=True, slots=True, kw_only=True)
class Measure:
    """Prints figures. A figure above zero is never printed as zero."""

    units: PrintUnits
    wording: Wording

    def pressure(self, pag: float) -> str:
        """One gauge pressure [Pa]."""
        return self._above_zero(self.units.pressure, max(pag, 0.0))

    def pressures(self, band: Band) -> str:
        """A band of gauge pressures [Pa]."""
        return self._band(self.units.pressure, (max(band[0], 0.0), max(band[1], 0.0)))

    def optional_pressures(self, band: Band | None) -> str:
        """A band of gauge pressures or of pressure differences [Pa], if it is known."""
        return self.wording.say("not_known") if band is None else self.pressures(band)

    def volume(self, m3: float | None) -> str:
        """One volume [m3]."""
        return self.wording.say("not_known") if m3 is None else self._above_zero(self.units.volume, m3)

    def volumes(self, band: Band | None) -> str:
        """A band of volumes [m3]."""
        return self.wording.say("not_known") if band is None else self._band(self.units.volume, band)

    def energies(self, band: Band | None) -> str:
        """A band of energies [J]."""
        return self.wording.say("not_known") if band is None else self._band(self.units.energy, band)

    def temperatures(self, band: Band | None) -> str:
        """A band of temperatures [K]."""
        return self.wording.say("not_known") if band is None else self._joined(self.units.temperature, band)

    def duration(self, seconds: float) -> str:
        """One time [s]."""
        return self.units.duration(seconds)

    def durations(self, band: Band | None) -> str:
        """A band of times [s]."""
        return self.wording.say("not_known") if band is None else self._band(self.units.duration, band)

    def pressure_unit(self) -> str:
        """The unit in which gauges are read."""
        return self.units.pressure(0.0).rpartition(" ")[2]

    def _band(self, write: Callable[[float], str], band: Band) -> str:
        low, high = band
        if high > 0.0 and write(high) == write(0.0):
            return self._above_zero(write, high)
        return self._joined(write, (low, high))

    def _joined(self, write: Callable[[float], str], band: Band) -> str:
        low, high = write(band[0]), write(band[1])
        if low == high:
            return high
        number, _, unit = low.rpartition(" ")
        short = number if number and high.rpartition(" ")[2] == unit else low
        return self.wording.say("band", low=short, high=high)

    def _above_zero(self, write: Callable[[float], str], value: float) -> str:
        words = write(value)
        return self.wording.say("above", value=words) if value > 0.0 and words == write(0.0) else words
