"""What a document needs besides the plan: its number, its date, the sheet, the units, and what it was made with."""

from dataclasses import dataclass
from typing import Protocol

from provenzero.document.model import Paper


class PrintUnits(Protocol):
    """Writes SI figures in the units of the site."""

    def pressure(self, pag: float) -> str:
        """A gauge pressure [Pa] with its unit."""

    def volume(self, m3: float) -> str:
        """A volume [m3] with its unit."""

    def temperature(self, kelvin: float) -> str:
        """A temperature [K] with its unit."""

    def energy(self, joule: float) -> str:
        """An energy [J] with its unit."""

    def duration(self, seconds: float) -> str:
        """A time [s] with its unit."""


@dataclass(frozen=True, slots=True, kw_only=True)
class PermitContext:
    """Given by the caller. `hold_s`: how long zero is watched; `recheck_s`: how often it is looked at again."""

    number: str
    issued: str
    company: str
    paper: Paper
    units: PrintUnits
    tool_version: str
    fingerprint: str
    site: str
    hold_s: float | None = None
    recheck_s: float | None = None

    def grouped_fingerprint(self) -> str:
        """The fingerprint in groups of four."""
        plain = self.fingerprint.replace(" ", "")
        return " ".join(plain[i : i + 4] for i in range(0, len(plain), 4))
