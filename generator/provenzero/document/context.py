"""What a document needs besides the plan: its number, its date, the sheet, the units, and what it was made with."""

from dataclasses import dataclass

from provenzero.document.model import Paper
from provenzero.quantity import Units

_SHORT = 19  # four groups of four


@dataclass(frozen=True, slots=True, kw_only=True)
class PermitContext:
    """Given by the caller. `hold_s`: how long zero is watched; `recheck_s`: how often it is looked at again."""

    number: str
    issued: str
    company: str
    paper: Paper
    units: Units
    tool_version: str
    fingerprint: str
    site: str
    hold_s: float | None = None
    recheck_s: float | None = None

    def short_fingerprint(self) -> str:
        """The head of the fingerprint in groups of four, as it stands on every page."""
        return self.grouped_fingerprint()[:_SHORT]

    def grouped_fingerprint(self) -> str:
        """The whole fingerprint in groups of four."""
        plain = self.fingerprint.replace(" ", "")
        return " ".join(plain[i : i + 4] for i in range(0, len(plain), 4))
