"""The command line: runs a command, and says in a line or two what stopped it."""

import sys

STOPPED = 130
OUR_FAULT = 70


def main() -> None:
    """Run the command line; neither a fault of ours nor a stop by the user shows a traceback."""
    try:
        from provenzero.cli.commands import app  # noqa: PLC0415 - a stop while it loads is caught as well

        app()
    except KeyboardInterrupt:
        sys.exit(_stopped())
    except SystemExit as left:
        sys.exit(_stopped() if left.code == STOPPED else left.code)
    except Exception as error:  # the one place where anything is caught
        _tell(f"a fault of this program, not of your files: {type(error).__name__}: {error}")
        _tell("no file was left half-written; please report it with the command and the files you gave")
        sys.exit(OUR_FAULT)


def _stopped() -> int:
    _tell("stopped; no file was left half-written")
    return STOPPED


def _tell(words: str) -> None:
    if sys.stderr is not None:
        sys.stderr.write(f"{words}\n")
