"""For the auditor: properties and evidence, grades, figures, what was assumed, where each demand is met."""

from provenzero.document.brief import Brief
from provenzero.document.model import Blank, Block, Column, Table, Text, Words
from provenzero.failure.grade import Grade, IsolationGrade


def assumptions(brief: Brief) -> Block:
    """Every gap of the description with the worse case that was taken."""
    gaps = brief.plan.unit.assumptions
    title = brief.say("assumptions.title")
    if not gaps:
        return Words(title=title, paragraphs=(brief.say("assumptions.none"),))
    columns = tuple(
        Column(title=brief.say(f"assumptions.{key}"), percent=percent)
        for key, percent in (("path", 28), ("line", 9), ("taken", 37), ("checked", 26))
    )
    rows = tuple(
        (
            Text(words=gap.path, strong=True),
            Text(words="" if gap.line is None else str(gap.line)),
            Text(words=gap.taken),
            Blank(),
        )
        for gap in gaps
    )
    return Table(title=title, columns=columns, rows=rows, before=(brief.say("assumptions.before"),))


def properties(brief: Brief) -> Table:
    """Each property in one sentence, whether it holds, and why."""
    columns = tuple(
        Column(title=brief.say(f"proof.{key}"), percent=percent)
        for key, percent in (("property", 13), ("meaning", 37), ("result", 14), ("evidence", 36))
    )
    rows = []
    for key, name in brief.wording.branch("proof.names").items():
        verdict = brief.proof.get(key)
        result, evidence = brief.say("proof.missing"), brief.say("proof.missing_evidence")
        if verdict is not None:
            result, evidence = brief.say("proof.holds" if verdict.holds else "proof.fails"), verdict.evidence
        rows.append(
            (
                Text(words=name, strong=True),
                Text(words=brief.say(f"proof.meanings.{key}")),
                Text(words=result, strong=True),
                Text(words=evidence),
            )
        )
    return Table(title=brief.say("proof.title"), columns=columns, rows=tuple(rows), before=(brief.say("proof.before"),))


def grades(brief: Brief) -> Table:
    """How the opened part is kept from each source."""
    columns = tuple(
        Column(title=brief.say(f"grades.{key}"), percent=percent)
        for key, percent in (("source", 32), ("barriers", 24), ("grade", 24), ("single", 20))
    )
    rows = tuple(
        (
            Text(words=brief.source(grade.source), strong=True),
            Text(words=" > ".join(grade.barriers) or brief.say("none")),
            Text(words=brief.say(f"grades.names.{grade.grade.value}")),
            Text(words=brief.say(f"grades.{_single(grade)}"), strong=not grade.survives_single_leak),
        )
        for grade in brief.plan.grades
    )
    return Table(title=brief.say("grades.title"), columns=columns, rows=rows, before=(brief.say("grades.before"),))


def _single(grade: Grade) -> str:
    if grade.survives_single_leak:
        return "survives"
    return "vent_free" if grade.grade is IsolationGrade.DRAINED else "fails"


def figures(brief: Brief) -> tuple[Table, ...]:
    """The computed figures; a figure that could not be computed is said to be not known."""
    given, measure = brief.figures, brief.measure
    usable = brief.say(
        "impairment.capacity_value",
        left=measure.volumes(given.usable_left_m3),
        needed=measure.volume(given.usable_needed_m3),
    )
    values = (
        ("temperature", measure.temperatures(given.temperature_k)),
        ("returned", measure.volumes(given.returned_total_m3)),
        ("room", measure.volume(given.reservoir_room_m3)),
        ("usable", usable),
        ("charging", measure.durations(given.charging_s)),
    )
    rows = tuple((Text(words=brief.say(f"figures.{key}"), strong=True), Text(words=value)) for key, value in values)
    columns = (
        Column(title=brief.say("figures.what"), percent=64),
        Column(title=brief.say("figures.value"), percent=36),
    )
    tables = [Table(title=brief.say("figures.title"), columns=columns, rows=rows)]
    if given.banks:
        tables.append(_banks(brief))
    if given.trapped:
        tables.append(_trapped(brief))
    return tuple(tables)


def _banks(brief: Brief) -> Table:
    measure = brief.measure
    rows = tuple(
        (
            Text(words=bank.tag, strong=True),
            Text(words=measure.volumes(bank.fluid_m3)),
            Text(words=measure.energies(bank.energy_charged_j)),
            Text(words=measure.energies(bank.energy_drained_j)),
            Text(words=measure.pressures(bank.precharge_pag)),
            Text(words=measure.volumes(bank.free_gas_m3)),
        )
        for bank in brief.figures.banks
    )
    shares = (("bank", 12), ("fluid", 16), ("charged", 18), ("drained", 18), ("precharge", 18), ("gas", 18))
    columns = tuple(Column(title=brief.say(f"figures.banks.{key}"), percent=percent) for key, percent in shares)
    return Table(title=brief.say("figures.banks.title"), columns=columns, rows=rows)


def _trapped(brief: Brief) -> Table:
    measure = brief.measure
    rows = tuple(
        (
            Text(words=brief.line(line.line), strong=True),
            Text(words=measure.volume(line.volume_m3)),
            Text(words=measure.volumes(line.returned_m3)),
            Text(words=measure.pressures(line.rise_pa_per_k)),
        )
        for line in brief.figures.trapped
    )
    shares = (("line", 43), ("volume", 17), ("returned", 20), ("rise", 20))
    columns = tuple(Column(title=brief.say(f"figures.trapped.{key}"), percent=percent) for key, percent in shares)
    return Table(title=brief.say("figures.trapped.title"), columns=columns, rows=rows)


def basis(brief: Brief) -> Table:
    """Which demand is answered where; clause numbers only of texts that were read."""
    columns = (Column(title=brief.say("basis.demand"), percent=68), Column(title=brief.say("basis.where"), percent=32))
    where = brief.plan.unit.identity.jurisdiction.value
    found = (*brief.wording.rows["basis.rows.all"], *brief.wording.rows[f"basis.rows.{where}"])
    rows = tuple((Text(words=demand), Text(words=answer)) for demand, answer in found)
    return Table(title=brief.say("basis.title"), columns=columns, rows=rows)


def repeat(brief: Brief) -> Words:
    """What made this document, so that it can be made again."""
    context = brief.context
    return Words(
        title=brief.say("repeat.title"),
        paragraphs=(
            brief.say("repeat.version", version=context.tool_version, site=context.site),
            brief.say("repeat.fingerprint", fingerprint=context.grouped_fingerprint()),
        ),
    )
