"""Times the whole permit command from cold, beside the bare renderer and the bare imports, and the planner by size.

Run with `make bench`. Every figure is the median of five whole processes; memory is the peak of one process.
"""

import json
import os
import statistics
import subprocess
import sys
import tempfile
import time
from math import log
from pathlib import Path

from sizes import sized

from provenzero.catalogue.load import catalogue
from provenzero.network.compile import compile_network
from provenzero.plan.make import make_plan
from provenzero.plan.model import Plan
from provenzero.unit.load import load_data

ROOT = Path(__file__).parents[2]
RUNS = 5
PDF_LIMIT = 1.3
HTML_LIMIT = 6.0
HELP_LIMIT = 3.0
MEMORY_LIMIT_MB = 200.0
PLAN_LIMIT_S = 2.0
EXPONENT_LIMIT = 2.1


def main() -> int:
    """Print all figures with their limits; exit code 1 if one is missed."""
    missed = [*_commands(), *_planner()]
    for line in missed:
        print(f"missed: {line}")
    return 1 if missed else 0


def _once(command: list[str]) -> tuple[float, float]:
    """Wall time [s] and peak memory [MB] of one process."""
    begin = time.perf_counter()
    process = subprocess.Popen(command, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
    _, status, usage = os.wait4(process.pid, 0)
    took = time.perf_counter() - begin
    if os.waitstatus_to_exitcode(status) != 0:
        raise SystemExit(f"failed: {' '.join(command)}")
    return took, usage.ru_maxrss / 1024.0


def _paired(one: list[str], other: list[str]) -> tuple[float, float, float]:
    """Median times of two commands run in turn, and the peak memory of the first."""
    _once(one)
    _once(other)
    pairs = [(_once(one), _once(other)) for _ in range(RUNS)]
    return (
        statistics.median(a[0] for a, _ in pairs),
        statistics.median(b[0] for _, b in pairs),
        max(a[1] for a, _ in pairs),
    )


def _commands() -> list[str]:
    unit = str(ROOT / "schemas" / "examples" / "land-rig.yaml")
    missed = []
    with tempfile.TemporaryDirectory() as folder:
        program = [sys.executable, "-m", "provenzero"]
        permit = [*program, "permit", unit, "--job", "replace-hoses", "--on", "upper-pipe-rams", "--out", folder]
        _once([*permit, "--format", "html"])
        page = next(Path(folder).glob("*.html"))
        bare = (
            "import sys, weasyprint; "
            "weasyprint.HTML(filename=sys.argv[1]).write_pdf(sys.argv[1] + '.pdf', pdf_variant='pdf/ua-1')"
        )
        cases = [
            ("pdf", [*permit, "--format", "pdf"], [sys.executable, "-c", bare, str(page)], PDF_LIMIT),
            (
                "html",
                [*permit, "--format", "html"],
                [sys.executable, "-c", "import yaml, jinja2, jsonschema"],
                HTML_LIMIT,
            ),
            ("help", [*program, "--help"], [sys.executable, "-c", "import typer"], HELP_LIMIT),
        ]
        for name, one, other, limit in cases:
            took, beside, memory = _paired(one, other)
            print(
                f"{name} seconds={took:.3f} beside={beside:.3f} ratio={took / beside:.2f} limit={limit} "
                f"memory_mb={memory:.0f}"
            )
            if took / beside > limit:
                missed.append(f"{name} ratio {took / beside:.2f} over {limit}")
            if memory > MEMORY_LIMIT_MB:
                missed.append(f"{name} memory {memory:.0f} MB over {MEMORY_LIMIT_MB:.0f} MB")
    return missed


def _planner() -> list[str]:
    job = catalogue().job("replace-manifold-regulator")
    if job is None:
        raise SystemExit("the catalogue lacks the job")
    points = []
    took = 0.0
    for functions, banks, pumps in ((10, 5, 2), (20, 10, 4), (40, 20, 8)):
        unit = load_data(sized(functions, banks, pumps)).unit
        if unit is None:
            raise SystemExit("the sized unit does not load")
        network = compile_network(unit)
        times = []
        for _ in range(RUNS):
            begin = time.perf_counter()
            plan = make_plan(unit, network, job, "RG-1")
            times.append(time.perf_counter() - begin)
            if not isinstance(plan, Plan):
                raise SystemExit("the sized unit has no plan")
        took = statistics.median(times)
        points.append((len(network.devices), took))
        size = f"functions={functions} banks={banks} pumps={pumps} devices={len(network.devices)}"
        print(f"plan {size} seconds={took:.3f}")
    (few, quick), (many, slow) = points[0], points[-1]
    exponent = log(slow / quick) / log(many / few)
    missed = [f"planning took {took:.2f} s"] if took > PLAN_LIMIT_S else []
    if exponent > EXPONENT_LIMIT:
        missed.append(f"exponent {exponent:.2f}")
    print(json.dumps({"devices": [p[0] for p in points]}))
    print(f"exponent={exponent:.2f}")
    return missed


if __name__ == "__main__":
    sys.exit(main())
