"""What holds for every test: no unexpected log line, and the same generated examples on every run of the checks."""

import logging
import os
import re
from collections.abc import Iterator

import pytest
from hypothesis import settings

settings.register_profile("local", deadline=None, print_blob=True)
settings.register_profile("checks", deadline=None, print_blob=True, derandomize=True)
settings.load_profile("checks" if os.environ.get("CI") else "local")


@pytest.fixture(autouse=True)
def no_unexpected_log_line(request: pytest.FixtureRequest, caplog: pytest.LogCaptureFixture) -> Iterator[None]:
    """Fail a test that logs a warning or worse, unless it is marked `logs` with a pattern of that line."""
    yield
    expected = [str(mark.args[0]) for mark in request.node.iter_markers("logs")]
    lines = [r.getMessage() for r in caplog.get_records("call") if r.levelno >= logging.WARNING]
    unexpected = [line for line in lines if not any(re.search(pattern, line) for pattern in expected)]
    assert not unexpected, f"unexpected log lines: {unexpected}"
    missing = [pattern for pattern in expected if not any(re.search(pattern, line) for line in lines)]
    assert not missing, f"expected log lines that did not come: {missing}"
