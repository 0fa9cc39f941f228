"""The commands there are; what each needs is imported only when it is called."""

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
