"""A small unit and a plan on it, built by hand: one pump, one bank of two bottles, two functions, four locks."""

from dataclasses import replace

import pytest

from provenzero.catalogue.job import Equipment, Job, Leave, TestKind
from provenzero.document.brief import Brief
from provenzero.document.context import PermitContext
from provenzero.document.figures import BankFigures, PermitFigures, StepFigures, TrappedFigures
from provenzero.document.model import Paper
from provenzero.document.wording import Wording, load_wording
from provenzero.failure.grade import Grade, IsolationGrade
from provenzero.network.model import (
    Actuator,
    Device,
    DeviceKind,
    DeviceTag,
    Gauge,
    Line,
    LineId,
    Medium,
    Network,
    OnLoss,
    Passage,
    PassageKind,
    Source,
    SourceKind,
)
from provenzero.plan.model import (
    Expect,
    Impairment,
    Lock,
    Plan,
    Purpose,
    Section,
    Step,
    StepKind,
    Verdict,
)
from provenzero.quantity import US
from provenzero.state.model import State
from provenzero.unit.model import (
    Assumption,
    Bank,
    Description,
    Drive,
    FluidKind,
    Identity,
    Jurisdiction,
    Pump,
    Reservoir,
    Separator,
    Unit,
)

PSI = 6894.757293168361
L = LineId
T = DeviceTag


def line(
    name: str, words: str, medium: Medium = Medium.CONTROL_FLUID, *, vent: bool = False, head: float = 0.0
) -> Line:
    return Line(id=L(name), name=words, medium=medium, volume_m3=0.002, vent=vent, static_head_pag=head)


def way(start: str, end: str, *, certain: bool = True) -> Passage:
    return Passage(kind=PassageKind.OPEN, source=L(start), target=L(end), certain=certain)


def valve(tag: str, kind: DeviceKind, name: str, normal: str, **positions: tuple[Passage, ...]) -> Device:
    return Device(
        tag=T(tag),
        kind=kind,
        name=name,
        location=f"place of {tag}",
        positions=positions,
        normal=normal,
        lockable=kind is not DeviceKind.GAS_VALVE,
        lock_holds_against=("hand",),
    )


def make_network() -> Network:
    lines = [
        line("atmosphere", "atmosphere", Medium.AIR, vent=True),
        line("reservoir", "reservoir T-1", vent=True),
        line("supply.board", "supply board", Medium.ELECTRIC),
        line("P-1.drive", "power to pump P-1", Medium.ELECTRIC),
        line("header", "accumulator header"),
        line("B-1.fluid", "fluid side of bank B-1"),
        line("B-1/1.gas", "nitrogen of bottle B-1/1", Medium.NITROGEN),
        line("B-1/2.gas", "nitrogen of bottle B-1/2", Medium.NITROGEN),
        line("ram.open", "Pipe ram, opening line", head=50_000.0),
        line("ram.close", "Pipe ram, closing line", head=50_000.0),
        line("gate.open", "Gate valve, opening line"),
        line("gate.close", "Gate valve, closing line"),
    ]
    handles = [
        valve(
            tag,
            DeviceKind.FOUR_WAY_VALVE,
            f"four-way valve, {label}",
            normal,
            open=(way("header", f"{name}.open"), way(f"{name}.close", "reservoir")),
            centre=(way(f"{name}.open", "reservoir"), way(f"{name}.close", "reservoir", certain=False)),
            close=(way("header", f"{name}.close"), way(f"{name}.open", "reservoir")),
        )
        for tag, name, label, normal in (("4W-1", "ram", "Pipe ram", "open"), ("4W-2", "gate", "Gate valve", "close"))
    ]
    check = Device(
        tag=T("CV-1"),
        kind=DeviceKind.CHECK_VALVE,
        name='check valve <of> the "header"',
        location="header",
        positions={
            "fitted": (Passage(kind=PassageKind.RELIEF, source=L("header"), target=L("reservoir"), set_pag=2e7),)
        },
        normal="fitted",
        movable=False,
        moved_by=(),
        on_loss=OnLoss(line=L("header"), position="fitted"),
    )
    devices = [
        valve("Q-1", DeviceKind.ISOLATOR, "isolator of pump P-1", "on", on=(way("supply.board", "P-1.drive"),), off=()),
        valve(
            "HV-31",
            DeviceKind.BANK_ISOLATION_VALVE,
            "isolation valve of bank B-1",
            "open",
            open=(way("header", "B-1.fluid"),),
            closed=(),
        ),
        valve(
            "HV-10",
            DeviceKind.BLEED_VALVE,
            "bleed valve, accumulator header",
            "closed",
            open=(way("header", "reservoir"),),
            closed=(),
        ),
        *(
            valve(
                f"B-1/{n}-gas",
                DeviceKind.GAS_VALVE,
                f"gas valve of bottle B-1/{n}",
                "closed",
                venting=(way(f"B-1/{n}.gas", "atmosphere"),),
                closed=(),
            )
            for n in (1, 2)
        ),
        *handles,
        check,
    ]
    stored = SourceKind.STORED
    sources = (
        Source(
            id="supply.board",
            name="supply board",
            line=L("supply.board"),
            kind=SourceKind.LIVE,
            low_pag=1.0,
            pressure_pag=1.0,
        ),
        Source(
            id="B-1",
            name="bank B-1, fluid under gas pressure",
            line=L("B-1.fluid"),
            kind=stored,
            low_pag=2700 * PSI,
            pressure_pag=3000 * PSI,
            gas=True,
        ),
        *(
            Source(
                id=f"B-1/{n} nitrogen",
                name=f"nitrogen precharge of bottle B-1/{n}",
                line=L(f"B-1/{n}.gas"),
                kind=stored,
                low_pag=1000 * PSI,
                pressure_pag=3000 * PSI,
                gas=True,
            )
            for n in (1, 2)
        ),
        Source(
            id="P-1",
            name="pump P-1",
            line=L("header"),
            kind=SourceKind.LIVE,
            low_pag=2700 * PSI,
            pressure_pag=3000 * PSI,
            drive=L("P-1.drive"),
            senses=L("header"),
            starts_below_pag=2700 * PSI,
        ),
    )
    gauges = tuple(
        Gauge(
            tag=tag,
            location=f"place of {tag}",
            line=L(on),
            reads=L(on),
            full_scale_pag=5000 * PSI,
            accuracy_fraction=0.01,
            resolution_pa=50 * PSI,
            readable=True,
        )
        for tag, on in (("PG-1", "header"), ("PG-2", "ram.open"), ("PG-3", "B-1.fluid"))
    )
    actuators = tuple(
        Actuator(name=name, label=label, open_line=L(f"{name}.open"), close_line=L(f"{name}.close"), valve=T(tag))
        for name, label, tag in (("ram", "Pipe ram", "4W-1"), ("gate", "Gate valve", "4W-2"))
    )
    return Network(
        lines={item.id: item for item in lines},
        devices={item.tag: item for item in devices},
        sources=sources,
        actuators=actuators,
        gauges=gauges,
        ports=(),
        charged_pag={},
    )


def make_unit() -> Unit:
    return Unit(
        identity=Identity(
            tag="HCU-7",
            name="closing unit",
            site="Rig 4 & yard",
            jurisdiction=Jurisdiction.US_LAND,
            rated_pressure_pag=3000 * PSI,
            drawing="D-1",
            manual="",
        ),
        description=Description(revision="5", date="2026-03-02", written_by="R. Example", verification=None),
        fluid=FluidKind.MINERAL_OIL,
        fluid_name="oil",
        fluid_density_kg_m3=870.0,
        ambient_low_k=270.0,
        ambient_high_k=310.0,
        reservoir=Reservoir(
            tag="T-1",
            location="skid",
            volume_m3=1.0,
            fluid_volume_m3=0.5,
            suction_head_m=1.0,
            drain=None,
            indoors=False,
        ),
        common_returns=True,
        header_fittings=(),
        banks=(
            Bank(
                tag="B-1",
                location="rack",
                attached_to="header",
                bottles=2,
                gas_volume_m3=0.04,
                separator=Separator.BLADDER,
                precharge_pag=1000 * PSI,
                precharge_temperature_k=293.0,
                isolation=None,
                bleed=None,
                bottle_valves=(),
                fittings=(),
            ),
        ),
        pumps=(
            Pump(
                tag="P-1",
                location="skid",
                drive=Drive.ELECTRIC,
                supply="board",
                energy=None,
                flow_m3_s=None,
                automatic=True,
                start_pressure_pag=2700 * PSI,
                stop_pressure_pag=3000 * PSI,
                suction=(),
                discharge=(),
                delivers_to="header",
            ),
        ),
        regulators=(),
        bypasses=(),
        functions=(),
        air=None,
        panels=(),
        nitrogen_backups=(),
        assumptions=(Assumption(path="functions.gate.valve.centre", line=212, taken="may block <or> vent"),),
    )


def make_job() -> Job:
    return Job(
        id="change_hoses",
        title="Change the hoses of one function",
        equipment=Equipment.FUNCTION,
        conditions=(),
        opens=("open_line", "close_line"),
        leave=Leave.AS_FOUND,
        limits=("One function only.",),
        hazards=("Dropped hose",),
        tools=("Spanners",),
        prepare=("Bring new hoses to the unit.",),
        work=("Change the hoses.",),
        restore=("Check that each fitting is tight.",),
        tests=(TestKind.LEAK,),
    )


BAND = (2700 * PSI, 3000 * PSI)
ZONE = (L("header"), L("ram.open"), L("ram.close"), L("P-1.drive"))


def start_state(network: Network) -> State:
    zero = (0.0, 0.0)
    pressures = dict.fromkeys(network.lines, zero)
    for name in ("header", "B-1.fluid", "ram.open", "gate.close"):
        pressures[L(name)] = BAND
    for name in ("B-1/1.gas", "B-1/2.gas"):
        pressures[L(name)] = (1000 * PSI, 3000 * PSI)
    for name in ("supply.board", "P-1.drive"):
        pressures[L(name)] = (1.0, 1.0)
    return State(
        positions={tag: device.normal for tag, device in network.devices.items()},
        pressures=pressures,
        pistons={"ram": "open", "gate": "close"},
        fed=frozenset({L("header")}),
        running=frozenset({"P-1"}),
        let_out=frozenset(),
        gassed=frozenset(),
    )


class Story:
    """Steps with the state after each; pressures that fall or rise are told in psi."""

    def __init__(self, state: State) -> None:
        self.states = [state]
        self.steps: list[Step] = []

    def add(self, step: Step, **psi: float) -> None:
        before = self.states[-1]
        pressures = dict(before.pressures)
        for name, value in psi.items():
            key = {"bank": "B-1.fluid", "drive": "P-1.drive", "ram_open": "ram.open", "gate_close": "gate.close"}
            pressures[L(key.get(name, name))] = (value * PSI, value * PSI)
        positions = dict(before.positions)
        device, position = step.device, step.position
        was = None
        if device is not None and position is not None:
            was = positions[device]
            positions[device] = position
        self.steps.append(replace(step, was=was))
        self.states.append(replace(before, positions=positions, pressures=pressures))


def expect(gauge: str, on: str, low: float, high: float) -> Expect:
    return Expect(gauge=gauge, line=L(on), low_pag=low * PSI, high_pag=high * PSI)


def make_plan() -> Plan:
    network = make_network()
    story = Story(start_state(network))
    prepare, isolate, release, verify = Section.PREPARE, Section.ISOLATE, Section.RELEASE, Section.VERIFY
    back, test = Section.REINSTATE, Section.TEST
    add = story.add
    add(Step(id="A1", section=prepare, kind=StepKind.WELL_STATE, hold_point=True, reason="well_state"))
    add(Step(id="A2", section=prepare, kind=StepKind.NOTIFY, reason="notify"))
    add(Step(id="A3", section=prepare, kind=StepKind.JOB_TEXT, facts={"text": "Bring new <hoses>."}, reason="job"))
    add(
        Step(
            id="A4",
            section=prepare,
            kind=StepKind.READ_BEFORE,
            reason="read_before",
            expect=(
                expect("PG-1", "header", 2700, 3000),
                expect("PG-2", "ram.open", 2700, 3000),
                expect("PG-3", "B-1.fluid", 2700, 3000),
            ),
        )
    )
    add(
        Step(
            id="B1",
            section=isolate,
            kind=StepKind.SET_AND_LOCK,
            device=T("Q-1"),
            position="off",
            lock=1,
            reason="energy_before_stored",
        ),
        drive=0.0,
    )
    add(
        Step(
            id="B2",
            section=isolate,
            kind=StepKind.TRY_START,
            facts={"pump": "P-1"},
            lines=(L("P-1.drive"),),
            reason="try_start",
        )
    )
    add(
        Step(
            id="B3",
            section=isolate,
            kind=StepKind.SET_AND_LOCK,
            device=T("HV-31"),
            position="closed",
            lock=2,
            reason="keeps_out",
        )
    )
    add(
        Step(
            id="C1",
            section=release,
            kind=StepKind.SET_AND_LOCK,
            device=T("HV-10"),
            position="open",
            lock=3,
            reason="keeps_open",
            lines=(L("header"),),
            expect=(expect("PG-1", "header", 0, 0),),
        ),
        header=0.0,
        ram_open=0.0,
    )
    add(
        Step(
            id="C2",
            section=release,
            kind=StepKind.CHECK_AND_LOCK,
            device=T("4W-1"),
            position="open",
            lock=4,
            reason="keeps_open",
        )
    )
    add(
        Step(
            id="D1",
            section=verify,
            kind=StepKind.TRY_OPERATE,
            facts={"function": "ram, gate", "panel": "RP-1"},
            reason="try_operate",
        )
    )
    add(
        Step(
            id="D2",
            section=verify,
            kind=StepKind.READ_ZERO,
            lines=(L("header"), L("ram.open")),
            reason="zero_read",
            expect=(expect("PG-1", "header", 0, 0), expect("PG-2", "ram.open", 0, 5)),
        )
    )
    add(
        Step(
            id="D3",
            section=verify,
            kind=StepKind.TEST_GAUGE,
            lines=(L("ram.close"),),
            facts={"gauges": "0"},
            reason="second_indication",
        )
    )
    add(Step(id="D4", section=verify, kind=StepKind.WATCH, lines=ZONE, hold_point=True, reason="hold"))
    add(Step(id="D5", section=verify, kind=StepKind.RELEASE_WORK, hold_point=True, reason="release_work"))
    add(Step(id="E1", section=Section.WORK, kind=StepKind.JOB_TEXT, facts={"text": "Change the hoses."}, reason="job"))
    add(Step(id="F1", section=back, kind=StepKind.CLEAR, hold_point=True, reason="clear"))
    add(
        Step(
            id="F2", section=back, kind=StepKind.UNLOCK, device=T("4W-1"), position="open", unlock=4, reason="reinstate"
        )
    )
    add(
        Step(
            id="F3",
            section=back,
            kind=StepKind.UNLOCK_AND_SET,
            device=T("HV-10"),
            position="closed",
            unlock=3,
            reason="reinstate",
        )
    )
    add(
        Step(
            id="F4",
            section=back,
            kind=StepKind.UNLOCK_AND_SET,
            device=T("HV-31"),
            position="open",
            unlock=2,
            moves_function="ram",
            reason="reinstate",
            expect=(expect("PG-1", "header", 2700, 3000),),
        ),
        header=3000.0,
        ram_open=3000.0,
    )
    add(
        Step(
            id="F5",
            section=back,
            kind=StepKind.UNLOCK_AND_SET,
            device=T("Q-1"),
            position="on",
            unlock=1,
            starts_pump="P-1",
            reason="reinstate",
        ),
    )
    add(Step(id="G1", section=test, kind=StepKind.LEAK_TEST, facts={"on": "ram"}, lines=ZONE, reason="test"))
    add(Step(id="G2", section=test, kind=StepKind.HAND_BACK, hold_point=True, reason="hand_back"))
    locks = (
        Lock(
            number=1,
            device=T("Q-1"),
            position="off",
            purpose=Purpose.ENERGY,
            holds_back=(("P-1", "header"),),
            keeps_open=(),
        ),
        Lock(
            number=2,
            device=T("HV-31"),
            position="closed",
            purpose=Purpose.BARRIER,
            holds_back=(("B-1", "B-1.fluid", "HV-31", "header"),),
            keeps_open=(),
        ),
        Lock(
            number=3, device=T("HV-10"), position="open", purpose=Purpose.VENT, holds_back=(), keeps_open=(L("header"),)
        ),
        Lock(
            number=4,
            device=T("4W-1"),
            position="open",
            purpose=Purpose.VENT,
            holds_back=(),
            keeps_open=(L("ram.close"),),
        ),
    )
    return Plan(
        unit=make_unit(),
        job=make_job(),
        on="ram",
        network=network,
        zone=ZONE,
        dead=ZONE,
        steps=tuple(story.steps),
        states=tuple(story.states),
        locks=locks,
        open_to_vent=(L("header"), L("ram.open"), L("ram.close")),
        unheld=(),
        grades=(
            Grade(
                source="supply.board",
                barriers=(T("Q-1"),),
                grade=IsolationGrade.ISOLATED_AT_ORIGIN,
                survives_single_leak=False,
            ),
            Grade(
                source="B-1", barriers=(T("HV-31"),), grade=IsolationGrade.BLOCK_AND_BLEED, survives_single_leak=True
            ),
        ),
        impairment=Impairment(
            functions_lost=("ram", "gate"),
            remote_lost=(),
            banks_lost=("B-1",),
            pumps_lost=("P-1",),
            panels_lost=(),
            backups_lost=(),
            power_sources_left=(),
        ),
    )


@pytest.fixture
def plan() -> Plan:
    return make_plan()


@pytest.fixture
def wording() -> Wording:
    return load_wording()


@pytest.fixture
def context() -> PermitContext:
    return PermitContext(
        number="LP-7-0042",
        issued="2026-03-05 06:40",
        company="Example Drilling",
        paper=Paper.A4,
        units=US,
        tool_version="0.1.0",
        fingerprint="9f3a61c07be24d15",
        site="default",
        hold_s=900.0,
        recheck_s=3600.0,
    )


@pytest.fixture
def proof() -> dict[str, Verdict]:
    names = ("dead", "locked", "least", "quiet", "honest", "reversible")
    return {name: Verdict(holds=True, evidence=f"evidence of {name}") for name in names}


@pytest.fixture
def figures() -> PermitFigures:
    return PermitFigures(
        returned_total_m3=(0.010, 0.012),
        reservoir_room_m3=0.5,
        usable_left_m3=(0.02, 0.03),
        usable_needed_m3=0.015,
        charging_s=(600.0, 720.0),
        temperature_k=(283.15, 293.15),
        steps={
            "C1": StepFigures(returned_m3=(0.010, 0.012), time_s=(30.0, 60.0), rebound_pag=(1100 * PSI, 1300 * PSI))
        },
        banks=(
            BankFigures(
                tag="B-1",
                fluid_m3=(0.03, 0.04),
                energy_charged_j=(1.0e6, 1.1e6),
                energy_drained_j=(0.9e6, 1.0e6),
                precharge_pag=(900 * PSI, 1000 * PSI),
                free_gas_m3=None,
            ),
        ),
        trapped=(TrappedFigures(line="ram.open", volume_m3=0.002),),
    )


@pytest.fixture
def brief(
    plan: Plan, figures: PermitFigures, proof: dict[str, Verdict], context: PermitContext, wording: Wording
) -> Brief:
    return Brief(plan=plan, figures=figures, proof=proof, context=context, wording=wording)
