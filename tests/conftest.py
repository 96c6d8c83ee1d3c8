"""What every test gets: seeded property tests, and a state folder of its own so that no test reads or leaves anything at home."""

from __future__ import annotations

import os
from pathlib import Path

import pytest
from hypothesis import HealthCheck, settings

settings.register_profile("ci", derandomize=True, deadline=None, suppress_health_check=[HealthCheck.too_slow])
settings.load_profile("ci")


@pytest.fixture(autouse=True, scope="session")
def _own_state_folder(tmp_path_factory: pytest.TempPathFactory) -> None:
    # Tests that start the command in another folder find this package also where it is not installed.
    os.environ["PYTHONPATH"] = str(Path(__file__).parent.parent)
    os.environ["XDG_STATE_HOME"] = str(tmp_path_factory.mktemp("state"))
