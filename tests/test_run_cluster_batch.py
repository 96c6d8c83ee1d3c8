"""Cluster files: what may stand in them, how long workers live, and what is submitted."""

from __future__ import annotations

import importlib.util
import subprocess
import sys
from pathlib import Path

import pytest
from hypothesis import given
from hypothesis import strategies as st

import uq
from uq.errors import StudyError, UseMistake
from uq.running.batch import SHORTEST_WALLTIME, clock, lifetime, read_batch_system, script

SLURM = """
system = "slurm"
cores = 8
memory = "16 GB"
walltime = "2 h"
jobs = 6
jobs_least = 1
queue = "night"
account = "plant"
directives = ["--constraint=zen4"]
before = ["module load python/3.12"]
"""
PBS = 'system = "pbs"\ncores = 4\nmemory = "8 GB"\nwalltime = "01:30:00"\n'


def written(folder: Path, text: str) -> Path:
    file = folder / "cluster.toml"
    file.write_text(text, encoding="utf-8")
    return file


def test_a_cluster_file_is_read_with_its_times_and_sizes(tmp_path: Path) -> None:
    slurm = read_batch_system(written(tmp_path, SLURM))
    assert (slurm.walltime, slurm.memory, slurm.jobs, slurm.jobs_least) == (7200.0, 16 * 10**9, 6, 1)
    assert slurm.patience == 86400.0
    assert slurm.words == "slurm, 6 jobs of 8 cores"
    pbs = read_batch_system(written(tmp_path, PBS))
    assert (pbs.walltime, pbs.jobs, pbs.jobs_least) == (5400.0, 1, None)
    assert read_batch_system(written(tmp_path, PBS.replace("01:30:00", "1-00:00:00"))).walltime == 86400.0


def test_every_mistake_is_told_at_once_with_its_place(tmp_path: Path) -> None:
    wrong = 'system = "slurn"\ncores = 0\nmemory = 16\nwaltime = "2 h"\njobs = 2\npatience = "2 kg"\n'
    with pytest.raises(StudyError) as caught:
        read_batch_system(written(tmp_path, wrong))
    told = [(mistake.line, mistake.key) for mistake in caught.value.mistakes]
    assert told == [(1, "system"), (2, "cores"), (3, "memory"), (4, "waltime"), (6, "patience")]
    text = str(caught.value)
    assert "did you mean `slurm`?" in text
    assert "did you mean `walltime`?" in text
    assert 'an amount of memory such as "512 MB"' in text
    for wrong, said in (
        (PBS.replace("01:30:00", "60 s"), "at least 300 s"),
        (PBS + "jobs = 2\njobs_least = 3\n", "at most `jobs`, 2"),
        ("system = ", "TOML"),
    ):
        with pytest.raises(StudyError, match=said):
            read_batch_system(written(tmp_path, wrong))
    with pytest.raises(StudyError, match="cannot be read"):
        read_batch_system(tmp_path / "none.toml")


@given(walltime=st.floats(SHORTEST_WALLTIME, 1e6))
def test_a_worker_always_ends_before_its_job_does_and_not_all_do_at_once(walltime: float) -> None:
    life, stagger = lifetime(walltime)
    assert life - stagger > 0
    assert life + stagger <= walltime - 60
    assert stagger >= 60


def test_a_time_is_told_as_batch_systems_do() -> None:
    assert [clock(seconds) for seconds in (300.0, 7199.6, 90061.0)] == ["00:05:00", "02:00:00", "25:01:01"]


def test_without_the_extra_a_run_says_how_to_install_it(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setitem(sys.modules, "dask_jobqueue", None)
    with pytest.raises(UseMistake, match=r"uq-ivp\[batch\]"):
        script(read_batch_system(written(tmp_path, SLURM)))


@pytest.mark.parametrize(("text", "expected"), [(SLURM, "slurm"), (PBS, "pbs")])
def test_the_script_that_would_be_submitted_is_shown(tmp_path: Path, text: str, expected: str) -> None:
    if importlib.util.find_spec("dask_jobqueue") is None:  # its import would change what Ctrl-C does in this process
        pytest.skip("the extra `batch` is not installed")
    file = written(tmp_path, text)
    command = [sys.executable, "-m", "uq", "run", "no-study.toml", "--cluster", str(file), "--show-script"]
    done = subprocess.run(command, capture_output=True, text=True, check=False, cwd=tmp_path)
    assert done.returncode == 0, done.stderr
    lines = done.stdout.splitlines()
    slurm = ["#SBATCH -p night", "#SBATCH -A plant", "#SBATCH --cpus-per-task=8", "#SBATCH -t 02:00:00", "#SBATCH --constraint=zen4"]
    wanted = {"slurm": [*slurm, "module load python/3.12"], "pbs": ["#PBS -l walltime=01:30:00"]}
    for line in (*wanted[expected], "export OMP_NUM_THREADS=1", "export NUMBA_NUM_THREADS=1"):
        assert line in lines
    last = lines[-1]
    assert {"slurm": "--nworkers 8", "pbs": "--nworkers 4"}[expected] in last
    assert {"slurm": "--lifetime 6480s --lifetime-stagger 360s", "pbs": "--lifetime 4860s --lifetime-stagger 270s"}[expected] in last
    assert "--nthreads 1" in last


HEARD = """
import signal, sys
from pathlib import Path
from uq.running.batch import read_batch_system, script
script(read_batch_system(Path(sys.argv[1])))
assert "dask_jobqueue" in sys.modules
assert signal.getsignal(signal.SIGINT) is signal.default_int_handler
"""


def test_ctrl_c_is_heard_as_before_where_a_batch_system_is_used(tmp_path: Path) -> None:
    if importlib.util.find_spec("dask_jobqueue") is None:
        pytest.skip("the extra `batch` is not installed")
    subprocess.run([sys.executable, "-c", HEARD, str(written(tmp_path, SLURM))], check=True)


def test_a_script_is_only_shown_of_a_cluster_file() -> None:
    command = [sys.executable, "-m", "uq", "run", "no-study.toml", "--show-script", "--cluster", "local:2"]
    done = subprocess.run(command, capture_output=True, text=True, check=False)
    assert done.returncode == 2
    assert "--cluster FILE.toml" in done.stderr


def test_importing_the_package_still_loads_no_cluster() -> None:
    assert uq.__version__
    program = "import uq.running.named, uq.running.batch, sys; assert not {'distributed', 'dask'} & set(sys.modules)"
    assert subprocess.run([sys.executable, "-c", program], check=False).returncode == 0
