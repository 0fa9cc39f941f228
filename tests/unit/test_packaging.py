"""What is installed is what is in the tree, and starting up loads no more than it must."""

import re
import subprocess
import sys
import tomllib
from importlib.resources import files
from pathlib import Path
from typing import Any

import pytest

import provenzero
from provenzero.resources import checklists, schemas

ROOT = Path(__file__).parents[2]
SOURCE = ROOT / "generator" / "provenzero"
DATA = {"provenzero.schemas": ROOT / "schemas", "provenzero.checklists": ROOT / "checklists"}
NOT_SHIPPED = {".pyc"}
SETTINGS: dict[str, Any] = tomllib.loads((ROOT / "pyproject.toml").read_text(encoding="utf-8"))


def test_every_package_is_listed_for_the_wheel() -> None:
    in_tree = {".".join(p.parent.relative_to(SOURCE.parent).parts) for p in SOURCE.rglob("__init__.py")}
    assert set(SETTINGS["tool"]["setuptools"]["packages"]) == in_tree | set(DATA)


def test_every_folder_with_code_is_a_package() -> None:
    folders = {p.parent for p in SOURCE.rglob("*.py")}
    assert [folder for folder in folders if not (folder / "__init__.py").is_file()] == []


@pytest.mark.parametrize("package", DATA)
def test_every_data_file_is_installed(package: str) -> None:
    folder = DATA[package]
    kept = [p.relative_to(folder) for p in folder.rglob("*") if p.is_file() and p.suffix not in NOT_SHIPPED]
    assert kept
    assert [name for name in kept if not files(package).joinpath(*name.parts).is_file()] == []


def test_the_resources_are_those_of_the_package() -> None:
    assert schemas().joinpath("__init__.py").is_file()
    assert checklists().joinpath("__init__.py").is_file()


def test_the_package_says_that_it_is_typed() -> None:
    assert files("provenzero").joinpath("py.typed").is_file()


def test_the_version_is_one_that_the_changelog_can_name() -> None:
    assert re.fullmatch(r"\d+\.\d+\.\d+", provenzero.__version__)


def test_reading_and_rendering_load_no_heavy_library_before_it_is_needed() -> None:
    heavy = ("jsonschema", "referencing", "weasyprint", "pint", "CoolProp")
    code = (
        "import sys, provenzero.reading.schema, provenzero.quantity, provenzero.render.html, provenzero.render.pdf;"
        f"print([name for name in {heavy!r} if name in sys.modules])"
    )
    run = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    assert run.stdout.strip() == "[]"
