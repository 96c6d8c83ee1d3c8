"""What every test gets: seeded property tests, and a state folder of its own so that no test reads or leaves anything at home."""

from __future__ import annotations

import os
import signal
from pathlib import Path

import pytest
from hypothesis import HealthCheck, settings

settings.register_profile("ci", derandomize=True, deadline=None, suppress_health_check=[HealthCheck.too_slow])
settings.load_profile("ci")

# A shell has Ctrl-C ignored in what it starts in the background, and in all that this starts.
signal.signal(signal.SIGINT, signal.default_int_handler)


@pytest.fixture(autouse=True, scope="session")
def _own_state_folder(tmp_path_factory: pytest.TempPathFactory) -> None:
    # Tests that start the command in another folder find this package also where it is not installed.
    os.environ["PYTHONPATH"] = str(Path(__file__).parent.parent)
    os.environ["XDG_STATE_HOME"] = str(tmp_path_factory.mktemp("state"))
