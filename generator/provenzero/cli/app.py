"""The command line: one command a module, imported only when it is called."""

import sys

import typer

from provenzero.cli.check import check
from provenzero.cli.jobs import jobs
from provenzero.cli.new import new
from provenzero.cli.permit import permit
from provenzero.cli.schema import schema

app = typer.Typer(
    help="Lock-out permits for hydraulic control units of surface blowout preventer stacks, computed and proven "
    "on the description of the unit. The maker's procedures, local law and competent persons come first.",
    no_args_is_help=True,
    add_completion=False,
    pretty_exceptions_enable=False,
    rich_markup_mode=None,
    context_settings={"help_option_names": ["-h", "--help"]},
)
app.command(no_args_is_help=False)(new)
app.command(no_args_is_help=True)(check)
app.command(no_args_is_help=True)(jobs)
app.command(no_args_is_help=True)(permit)
app.command(no_args_is_help=False)(schema)


def main() -> None:
    """Run the command line; a fault of ours is reported in two lines, never as a traceback."""
    try:
        app()
    except KeyboardInterrupt:
        print_error("stopped; nothing half-written was left")
        sys.exit(130)
    except Exception as error:  # the one place where anything is caught
        print_error(f"a fault of this program, not of your files: {type(error).__name__}: {error}")
        print_error("nothing was written; please report it with the command and the files you gave")
        sys.exit(70)


def print_error(words: str) -> None:
    """One line to the error stream."""
    typer.echo(words, err=True)
