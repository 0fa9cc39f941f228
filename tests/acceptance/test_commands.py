"""The commands as a person calls them: what they print, what they write, and with which exit code they end."""

import json
import os
import subprocess
import sys
from pathlib import Path
from typing import Any

import pytest

from provenzero.resources import schemas

HERE = Path(__file__).parent
EXAMPLES = HERE.parents[1] / "schemas" / "examples"
LAND_RIG = EXAMPLES / "land-rig.yaml"
POSITIVE = sorted((HERE / "positive").glob("*.yaml"))
NEGATIVE = sorted((HERE / "negative").glob("*.yaml"))
ISSUED = "2026-03-01 08:00 UTC"
HOSES = ("--job", "replace-hoses", "--on")
DONE, FOUND, BAD_INPUT = 0, 1, 2


def run(
    *words: str | Path, folder: Path | None = None, code: int | None = None, columns: int = 200
) -> subprocess.CompletedProcess[str]:
    """Call the command; whatever happens, it never answers with a traceback or with a fault of its own."""
    done = subprocess.run(
        [sys.executable, "-m", "provenzero", *map(str, words)],
        cwd=folder,
        capture_output=True,
        text=True,
        encoding="utf-8",
        check=False,
        timeout=120,
        env=os.environ | {"PYTHONUTF8": "1", "COLUMNS": str(columns)},
    )
    said = done.stdout + done.stderr
    assert "Traceback" not in said, said
    assert "a fault of this program" not in said, said
    if code is not None:
        assert done.returncode == code, said
    return done


def names(folder: Path) -> list[str]:
    return sorted(path.name for path in folder.iterdir())


def schema(kind: str) -> Any:
    return json.loads(schemas().joinpath(f"{kind}.schema.json").read_text(encoding="utf-8"))


def without_bleeds(folder: Path) -> Path:
    """The land rig without a single bleed valve, and with regulators that let nothing back to the tank."""
    lines = LAND_RIG.read_text(encoding="utf-8").splitlines()
    kept = ["    bleed: none" if line.startswith("    bleed:") else line for line in lines if "kind: bleed" not in line]
    file = folder / "no-bleeds.yaml"
    file.write_text("\n".join(kept).replace("relieving: yes", "relieving: no"), encoding="utf-8")
    return file


def test_new_writes_a_description_that_check_takes_as_it_stands(tmp_path: Path) -> None:
    done = run("new", "rig-5.yaml", folder=tmp_path, code=DONE)
    assert "provenzero check rig-5.yaml" in done.stdout
    assert names(tmp_path) == ["rig-5.yaml"]
    checked = run("check", "rig-5.yaml", folder=tmp_path, code=DONE)
    assert "NOT VERIFIED" in checked.stdout
    assert checked.stderr == ""


def test_a_permit_can_be_made_from_the_starter_as_it_stands(tmp_path: Path) -> None:
    run("new", folder=tmp_path, code=DONE)
    run("permit", "unit.yaml", *HOSES, "pipe-rams", "--format", "html", folder=tmp_path, code=DONE)
    assert names(tmp_path / "out") == ["HCU-1_replace-hoses_pipe-rams.html"]


def test_new_never_writes_over_a_file(tmp_path: Path) -> None:
    file = tmp_path / "rig-5.yaml"
    file.write_text("mine", encoding="utf-8")
    done = run("new", file, code=BAD_INPUT)
    assert "already there" in done.stderr
    assert file.read_text(encoding="utf-8") == "mine"


def test_new_in_a_folder_that_is_not_there_says_so(tmp_path: Path) -> None:
    done = run("new", tmp_path / "none" / "rig-5.yaml", code=BAD_INPUT)
    assert "no folder" in done.stderr
    assert names(tmp_path) == []


@pytest.mark.parametrize("file", [*sorted(EXAMPLES.glob("*.yaml")), *POSITIVE], ids=lambda file: file.stem)
def test_check_takes_a_good_description(file: Path) -> None:
    done = run("check", file, code=DONE)
    assert done.stdout.split()[:1] == ["unit"]
    assert done.stdout.split()[1].startswith("HCU-")
    assert done.stderr == ""


def test_check_lists_each_unknown_with_its_line() -> None:
    done = run("check", EXAMPLES / "workover.yaml", code=DONE)
    lines = (EXAMPLES / "workover.yaml").read_text(encoding="utf-8").splitlines()
    told = [line for line in done.stdout.splitlines() if line.startswith("line ")]
    assert len(told) == sum(line.count(" unknown") for line in lines if not line.startswith("#"))
    for line in told:
        assert "unknown" in lines[int(line.split()[1]) - 1]


def test_check_tells_a_machine_the_same_as_a_person() -> None:
    data = json.loads(run("check", EXAMPLES / "workover.yaml", "--format", "json", code=DONE).stdout)
    assert data["findings"] == []
    assert data["assumptions"][0].keys() == {"path", "line", "taken"}
    assert data["unit"]["not known"] == str(len(data["assumptions"]))


def test_check_of_a_description_with_a_warning_ends_with_1(tmp_path: Path) -> None:
    file = tmp_path / "warned.yaml"
    text = LAND_RIG.read_text(encoding="utf-8").replace("set_pressure: 3300 psi", "set_pressure: 4000 psi")
    file.write_text(text, encoding="utf-8")
    assert "warning: found a relief at 4000 psi" in run("check", file, code=FOUND).stderr
    assert json.loads(run("check", file, "--format", "json", code=FOUND).stdout)["findings"][0]["severity"] == "warning"


CURES = {
    "air-pump-without-air": "the air supply under `air`",
    "comma-number": "3000 psi, or 3 psi",
    "duplicate-key": "each key once",
    "gauge-too-small": "at least 3000 psi",
    "list-at-the-top": "'key: value' lines at the top",
    "missing-section": "the key pumps",
    "missing-unit": "a value such as 3000 psi",
    "precharge-too-high": "less than the lowest pressure in service, 2700 psi",
    "regulator-ring": "a way that begins at the header",
    "start-above-stop": "less than the stop at 3000 psi",
    "tab": "spaces",
    "tag-twice": "each tag once",
    "unknown-key": "did you mean 'rated_pressure'?",
    "wrong-reference": "did you mean manifold?",
}
LINES = {
    "air-pump-without-air": "drive: air",
    "comma-number": "3,000 psi",
    "duplicate-key": "volume: 160 gal",
    "gauge-too-small": "full_scale: 2000 psi",
    "list-at-the-top": "- format: 1",
    "missing-section": "format: 1",
    "missing-unit": "stop_pressure: 3000",
    "precharge-too-high": "2800 psi",
    "regulator-ring": "fed_from: annular-line",
    "start-above-stop": "start_pressure: 3100 psi",
    "tab": "\tvolume",
    "tag-twice": "tag: SV-5",
    "unknown-key": "rated_presure",
    "wrong-reference": "manifolt",
}


def test_each_bad_description_is_expected_to_be_told_something() -> None:
    assert [file.stem for file in NEGATIVE] == sorted(CURES) == sorted(LINES)


@pytest.mark.parametrize("file", NEGATIVE, ids=lambda file: file.stem)
def test_a_bad_description_is_told_file_line_and_cure(file: Path) -> None:
    done = run("check", file, code=BAD_INPUT)
    assert done.stdout == ""
    first = done.stderr.splitlines()[0]
    assert first.startswith(f"{file}:")
    line = int(first.removeprefix(f"{file}:").split(":")[0])
    assert LINES[file.stem] in file.read_text(encoding="utf-8").splitlines()[line - 1]
    assert "found " in first
    assert CURES[file.stem] in first


@pytest.mark.parametrize("file", NEGATIVE, ids=lambda file: file.stem)
def test_no_permit_is_written_from_a_bad_description(file: Path, tmp_path: Path) -> None:
    done = run("permit", file, *HOSES, "pipe-rams", "--out", tmp_path / "out", code=BAD_INPUT)
    assert done.stderr.startswith(f"{file}:")
    assert names(tmp_path) == []


def test_a_machine_is_told_the_findings_of_a_bad_description() -> None:
    file = HERE / "negative" / "unknown-key.yaml"
    for command in ("check", "jobs"):
        [finding] = json.loads(run(command, file, "--format", "json", code=BAD_INPUT).stdout)["findings"]
        assert (finding["file"], finding["path"]) == (str(file), "unit.rated_presure")
        assert isinstance(finding["line"], int)


@pytest.mark.parametrize("command", ["check", "jobs"])
def test_a_file_that_is_not_there_is_bad_input(command: str, tmp_path: Path) -> None:
    assert "no such file" in run(command, tmp_path / "none.yaml", code=BAD_INPUT).stderr


def test_jobs_has_the_form_that_machines_rely_on() -> None:
    data = json.loads(run("jobs", LAND_RIG, "--format", "json", code=DONE).stdout)
    assert list(data) == ["jobs"]
    assert len(data["jobs"]) == 10
    for entry in data["jobs"]:
        assert list(entry) == ["job", "title", "on"]
        assert entry["on"]
        assert all(isinstance(name, str) for name in (entry["job"], entry["title"], *entry["on"]))
    hoses = next(entry for entry in data["jobs"] if entry["job"] == "replace-hoses")
    assert hoses == {
        "job": "replace-hoses",
        "title": "Replace the hoses of a function",
        "on": ["annular", "upper-pipe-rams", "blind-rams", "lower-pipe-rams", "choke-gate", "kill-gate"],
    }


def test_jobs_lists_only_what_applies() -> None:
    done = run("jobs", EXAMPLES / "workover.yaml", code=DONE)
    assert "overhaul-air-pump" in done.stdout
    assert "overhaul-electric-pump" not in done.stdout
    assert "BK-A/1 to BK-A/4" in done.stdout


def test_a_bad_job_file_of_the_site_is_told_with_its_line(tmp_path: Path) -> None:
    file = tmp_path / "paint.yaml"
    file.write_text("format: 1\njob: paint\ntitle: Paint\nequipment: skid\n", encoding="utf-8")
    done = run("jobs", LAND_RIG, "--own-jobs", tmp_path, code=BAD_INPUT)
    assert f"{file}:4:" in done.stderr
    missing = run("permit", LAND_RIG, *HOSES, "annular", "--own-jobs", tmp_path / "none", code=BAD_INPUT)
    assert "no such folder" in missing.stderr


PERMITS = [
    ("land-rig", "overhaul-electric-pump", "P-1", "HCU-7_overhaul-electric-pump_P-1"),
    ("jack-up", "replace-hoses", "upper-pipe-rams", "HCU-3_replace-hoses_upper-pipe-rams"),
    ("workover", "overhaul-air-pump", "PA-1", "HCU-22_overhaul-air-pump_PA-1"),
]


@pytest.mark.parametrize(("name", "job", "on", "stem"), PERMITS, ids=[name for name, *_ in PERMITS])
def test_a_permit_is_written_as_a_page_and_as_a_plan_that_fits_its_schema(
    name: str, job: str, on: str, stem: str, tmp_path: Path
) -> None:
    from jsonschema import Draft202012Validator

    out = tmp_path / "permits" / "today"
    file = EXAMPLES / f"{name}.yaml"
    done = run("permit", file, "--job", job, "--on", on, "--out", out, "--format", "html,json", code=DONE)
    assert names(out) == [f"{stem}.html", f"{stem}.json"]
    assert done.stdout.splitlines() == [str(out / f"{stem}.html"), str(out / f"{stem}.json")]
    plan = json.loads((out / f"{stem}.json").read_text(encoding="utf-8"))
    assert [error.message for error in Draft202012Validator(schema("plan")).iter_errors(plan)] == []
    page = (out / f"{stem}.html").read_text(encoding="utf-8")
    assert page.startswith("<!DOCTYPE html>")
    assert on in page
    assert "http://" not in page.replace("http://www.w3.org/", "")


@pytest.mark.parametrize("file", sorted(EXAMPLES.glob("*.yaml")), ids=lambda file: file.stem)
def test_every_job_that_applies_to_an_example_gets_a_proven_permit(file: Path, tmp_path: Path) -> None:
    listed = json.loads(run("jobs", file, "--format", "json", code=DONE).stdout)["jobs"]
    assert len(listed) >= 8
    for entry in listed:
        words = ("--job", entry["job"], "--on", entry["on"][-1])
        done = run("permit", file, *words, "--out", tmp_path, "--format", "json", code=DONE)
        plan = json.loads(Path(done.stdout.strip()).read_text(encoding="utf-8"))
        assert plan["zone"], entry["job"]
        assert all(verdict["holds"] for verdict in plan["proof"].values()), entry["job"]
    assert len(names(tmp_path)) == len(listed)


def test_a_permit_is_written_as_a_pdf(tmp_path: Path) -> None:
    run("permit", LAND_RIG, *HOSES, "upper-pipe-rams", "--out", tmp_path, "--format", "pdf", code=DONE)
    [name] = names(tmp_path)
    assert name == "HCU-7_replace-hoses_upper-pipe-rams.pdf"
    assert (tmp_path / name).read_bytes().startswith(b"%PDF-")


@pytest.mark.parametrize("name", [file.stem for file in POSITIVE])
def test_a_permit_can_be_made_for_a_unit_that_somebody_described(name: str, tmp_path: Path) -> None:
    file = HERE / "positive" / f"{name}.yaml"
    run("permit", file, *HOSES, "pipe-rams", "--out", tmp_path, "--format", "json", code=DONE)
    assert len(names(tmp_path)) == 1


def test_the_same_input_gives_the_same_bytes(tmp_path: Path) -> None:
    first, second = tmp_path / "first", tmp_path / "second"
    for out in (first, second):
        words: list[str | Path] = [*HOSES, "upper-pipe-rams", "--issued", ISSUED, "--format", "html,json", "--out", out]
        run("permit", LAND_RIG, *words, code=DONE)
    assert names(first) == names(second)
    for name in names(first):
        assert (first / name).read_bytes() == (second / name).read_bytes()
    assert ISSUED in (first / "HCU-7_replace-hoses_upper-pipe-rams.html").read_text(encoding="utf-8")


def test_explain_says_why_each_lock_and_each_step_is_there(tmp_path: Path) -> None:
    done = run("permit", LAND_RIG, *HOSES, "annular", "--out", tmp_path, "--format", "json", "--explain", code=DONE)
    assert "lock 1 " in done.stdout
    assert "because: " in done.stdout


@pytest.mark.parametrize(
    ("job", "on", "cure"),
    [
        ("replace-hose", "upper-pipe-rams", "did you mean replace-hoses?"),
        ("replace-hoses", "uper-pipe-rams", "did you mean upper-pipe-rams?"),
        ("overhaul-air-pump", "P-1", "possible: P-2"),
        ("replace-four-way-valve", "hv-2", "did you mean HV-2?"),
    ],
)
def test_a_job_or_a_tag_that_is_not_there_gets_the_nearest_one(job: str, on: str, cure: str, tmp_path: Path) -> None:
    done = run("permit", LAND_RIG, "--job", job, "--on", on, "--out", tmp_path / "out", code=BAD_INPUT)
    assert cure in done.stderr
    assert names(tmp_path) == []


@pytest.mark.parametrize(
    ("job", "on", "why", "cure"),
    [
        ("replace-hoses", "HV-2", "HV-2 is a four-way valve", "did you mean upper-pipe-rams?"),
        ("replace-bottle-bladder", "BK-2", "BK-2 is a bank of bottles", "did you mean BK-2/1?"),
        ("overhaul-air-pump", "P-1", "P-1 is a pump (drive: electric)", "; possible: P-2"),
        ("lock-out-for-transport", "HCU-7", "done on the whole unit", "did you mean unit?"),
    ],
)
def test_a_tag_of_another_kind_is_told_what_it_is_and_what_goes_with_it(job: str, on: str, why: str, cure: str) -> None:
    done = run("permit", LAND_RIG, "--job", job, "--on", on, code=BAD_INPUT)
    [line] = done.stderr.splitlines()
    assert why in line
    assert cure in line


def test_what_somebody_typed_cannot_steer_the_terminal() -> None:
    done = run("permit", LAND_RIG, *HOSES, "a\nb\x1b[31m", code=BAD_INPUT)
    assert "\x1b" not in done.stderr
    assert len(done.stderr.splitlines()) == 1


def test_a_job_of_the_site_that_opens_a_port_its_equipment_never_has_is_told_with_its_line(tmp_path: Path) -> None:
    shipped = HERE.parents[1] / "checklists" / "jobs" / "replace-hoses.yaml"
    file = tmp_path / "own.yaml"
    file.write_text(shipped.read_text(encoding="utf-8").replace("close_line]", "suction]"), encoding="utf-8")
    done = run("permit", LAND_RIG, *HOSES, "annular", "--own-jobs", tmp_path, "--out", tmp_path / "out", code=BAD_INPUT)
    assert f"{file}:5:" in done.stderr
    assert "suction, which no function has" in done.stderr
    assert not (tmp_path / "out").exists()


def test_a_format_that_is_not_there_is_refused_before_anything_is_written(tmp_path: Path) -> None:
    words: list[str | Path] = [*HOSES, "annular", "--out", tmp_path / "out", "--format", "html,docx"]
    assert "pdf, html, json" in run("permit", LAND_RIG, *words, code=BAD_INPUT).stderr
    assert names(tmp_path) == []


def test_a_refused_plan_names_line_and_reason_and_writes_nothing(tmp_path: Path) -> None:
    file, out = without_bleeds(tmp_path), tmp_path / "out"
    done = run("permit", file, *HOSES, "upper-pipe-rams", "--out", out, "--format", "html,json", code=FOUND)
    head, *reasons, advice = done.stderr.splitlines()
    assert head == "refused: no safe plan for replace-hoses on upper-pipe-rams of HCU-7"
    assert any(reason.startswith("  upper-pipe-rams.open: Pressure stays trapped here.") for reason in reasons), reasons
    assert "Open nothing" in advice
    assert done.stdout == ""
    assert not out.exists()


PLACES = {
    "a file": ("file", "a file of that name"),
    "under a file": ("file/out", "a folder that cannot be made"),
    "a name too long": ("x" * 300, "a folder that cannot be made"),
}


@pytest.mark.parametrize(("out", "found"), PLACES.values(), ids=PLACES.keys())
def test_an_out_folder_that_cannot_be_is_bad_input_and_nothing_is_left(out: str, found: str, tmp_path: Path) -> None:
    (tmp_path / "file").write_text("mine", encoding="utf-8")
    done = run("permit", LAND_RIG, *HOSES, "annular", "--out", tmp_path / out, "--format", "json", code=BAD_INPUT)
    assert found in done.stderr
    assert names(tmp_path) == ["file"]
    assert (tmp_path / "file").read_text(encoding="utf-8") == "mine"


@pytest.mark.skipif(not hasattr(os, "geteuid") or os.geteuid() == 0, reason="nothing is closed to this user")
def test_an_out_folder_that_is_closed_is_bad_input_and_nothing_is_left(tmp_path: Path) -> None:
    out = tmp_path / "closed"
    out.mkdir(mode=0o500)
    done = run("permit", LAND_RIG, *HOSES, "annular", "--out", out, "--format", "json", code=BAD_INPUT)
    assert "closed to you" in done.stderr
    assert names(out) == []


def test_a_document_that_cannot_be_written_leaves_nothing_half_written(tmp_path: Path) -> None:
    target = tmp_path / "HCU-7_replace-hoses_annular.json"
    target.mkdir()
    done = run("permit", LAND_RIG, *HOSES, "annular", "--out", tmp_path, "--format", "json", code=BAD_INPUT)
    assert "a folder of that name" in done.stderr
    assert names(tmp_path) == [target.name]
    assert names(target) == []


@pytest.mark.parametrize("kind", ["unit", "job", "plan"])
def test_schema_prints_the_schema_of_each_kind_of_file(kind: str) -> None:
    assert json.loads(run("schema", kind, code=DONE).stdout) == schema(kind)


@pytest.mark.parametrize("command", ["new", "check", "jobs", "permit", "schema"])
def test_each_command_has_help(command: str) -> None:
    assert f"provenzero {command}" in run(command, "--help", code=DONE).stdout


@pytest.mark.parametrize("command", ["new", "check", "jobs", "permit", "schema"])
def test_the_examples_in_the_help_can_be_copied_as_they_stand(command: str) -> None:
    lines = run(command, "--help", columns=80, code=DONE).stdout.splitlines()
    given = [line.strip().removeprefix("Example: ") for line in lines if f"provenzero {command} " in line]
    examples = [line for line in given if not line.startswith("Usage:")]
    assert examples
    for example in examples:
        assert example.startswith(f"provenzero {command} ")
    following = [lines[i + 1] for i, line in enumerate(lines) if line.strip().endswith(tuple(examples))]
    assert [line for line in following if line.strip()] == [], "an example that runs on in the next line"


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="no device that is always full")
@pytest.mark.parametrize("words", [("schema",), ("jobs", LAND_RIG, "--format", "json"), ("check", LAND_RIG)])
def test_a_result_that_finds_no_room_is_told(words: tuple[str | Path, ...]) -> None:
    with Path("/dev/full").open("wb") as full:
        done = subprocess.run(
            [sys.executable, "-m", "provenzero", *map(str, words)], stdout=full, stderr=subprocess.PIPE, check=False
        )
    assert done.returncode == BAD_INPUT
    assert done.stderr.decode().startswith("found an output that takes no more")
    assert len(done.stderr.splitlines()) == 1


def test_a_reader_that_has_gone_ends_the_program_without_a_word() -> None:
    with subprocess.Popen(
        [sys.executable, "-m", "provenzero", "schema"], stdout=subprocess.PIPE, stderr=subprocess.PIPE
    ) as process:
        assert process.stdout is not None
        assert process.stderr is not None
        process.stdout.close()
        assert process.stderr.read() == b""


def test_a_file_name_that_is_too_long_is_bad_input(tmp_path: Path) -> None:
    long = tmp_path / f"{'x' * 300}.yaml"
    for words in (("new", long), ("check", long), ("jobs", LAND_RIG, "--own-jobs", long)):
        assert "found" in run(*words, code=BAD_INPUT).stderr


def test_a_command_that_is_not_there_is_bad_input() -> None:
    assert "permt" in run("permt", code=BAD_INPUT).stderr


def test_markup_in_a_label_cannot_act_on_the_page(tmp_path: Path) -> None:
    file = tmp_path / "marked.yaml"
    text = LAND_RIG.read_text(encoding="utf-8")
    file.write_text(text.replace("label: UPPER PIPE RAMS", "label: <script>alert(1)</script>"), encoding="utf-8")
    run("permit", file, *HOSES, "upper-pipe-rams", "--out", tmp_path / "out", "--format", "html", code=DONE)
    page = (tmp_path / "out" / "HCU-7_replace-hoses_upper-pipe-rams.html").read_text(encoding="utf-8")
    assert "<script>alert(1)" not in page
    assert "&lt;script&gt;alert(1)" in page


def test_a_permit_is_made_for_the_unit_as_it_stands_and_says_so(tmp_path: Path) -> None:
    run(
        "permit",
        LAND_RIG,
        *HOSES,
        "annular",
        "--standing",
        "IV-1=closed",
        "--out",
        tmp_path,
        "--format",
        "html",
        code=DONE,
    )
    page = next(tmp_path.glob("*.html")).read_text(encoding="utf-8")
    assert "Made for the unit as it stands" in page
    assert "IV-1 CLOSED" in page


@pytest.mark.parametrize(
    ("word", "cure"),
    [("HV2=close", "did you mean HV-2?"), ("HV-2=shut", "open, centre, close"), ("HV-2", "TAG=position")],
)
def test_a_device_or_a_position_that_is_not_there_is_told(word: str, cure: str, tmp_path: Path) -> None:
    done = run("permit", LAND_RIG, *HOSES, "annular", "--standing", word, "--out", tmp_path / "out", code=BAD_INPUT)
    assert cure in done.stderr
    assert not (tmp_path / "out").exists()
