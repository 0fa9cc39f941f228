"""SI figures and bands in the words of the paper: units of the site, not known where nothing is known."""

from collections.abc import Callable
from dataclasses import dataclass

from provenzero.document.figures import Band
from provenzero.document.wording import Wording
from provenzero.quantity import Units

_NO_BREAK = "\u00a0"


@dataclass(frozen=True, slots=True, kw_only=True)
class Measure:
    """Prints figures. Rounding never turns a figure above zero into zero: the units see to that."""

    units: Units
    wording: Wording

    def pressure(self, pag: float) -> str:
        """One gauge pressure [Pa], never below zero."""
        return self.units.pressure(max(pag, 0.0))

    def pressures(self, band: Band | None) -> str:
        """A band of gauge pressures or of differences [Pa], rounded outward, never below zero."""
        if band is None:
            return self.wording.say("not_known")
        return self.units.pressure_band(max(band[0], 0.0), max(band[1], 0.0))

    def volume(self, m3: float | None) -> str:
        """One volume [m3]."""
        return self.wording.say("not_known") if m3 is None else self.units.volume(m3)

    def volumes(self, band: Band | None) -> str:
        """A band of volumes [m3]."""
        return self._band(self.units.volume, band)

    def energies(self, band: Band | None) -> str:
        """A band of energies [J]."""
        return self._band(self.units.energy, band)

    def temperatures(self, band: Band | None) -> str:
        """A band of temperatures [K]."""
        return self._band(self.units.temperature, band)

    def duration(self, seconds: float) -> str:
        """One time [s]."""
        return self.units.duration(seconds)

    def durations(self, band: Band | None) -> str:
        """A band of times [s]."""
        return self._band(self.units.duration, band)

    def gauge_unit(self) -> str:
        """The unit in which gauges are read."""
        return self.units.pressure_units[0].value

    def _band(self, write: Callable[[float], str], band: Band | None) -> str:
        if band is None:
            return self.wording.say("not_known")
        low, high = write(band[0]), write(band[1])
        if low == high:
            return high
        number, _, unit = low.partition(_NO_BREAK)
        plain = high.count(_NO_BREAK) == 1 and high.endswith(f"{_NO_BREAK}{unit}")
        return self.wording.say("band", low=number if plain else low, high=high)
