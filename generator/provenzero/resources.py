"""Where the data that ships with the program lies, in a checkout and in an installed wheel alike."""

from importlib.resources import files
from importlib.resources.abc import Traversable


def schemas() -> Traversable:
    """The folder of JSON Schemas and example files."""
    return files("provenzero.schemas")


def checklists() -> Traversable:
    """The folder of jobs, site rules, wording, page templates and fonts."""
    return files("provenzero.checklists")
