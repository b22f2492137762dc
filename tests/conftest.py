"""What all tests share: the folder of the project, repeatable properties, a guard for runs on the wheel."""

import sys
from collections.abc import Iterator
from pathlib import Path

import pytest
from hypothesis import settings

import calloutlint

PROJECT = Path(__file__).parent.parent

settings.register_profile("repeatable", derandomize=True, deadline=None, database=None)
settings.load_profile("repeatable")


def pytest_addoption(parser: pytest.Parser) -> None:
    parser.addoption(
        "--installed",
        action="store_true",
        help="refuse to run unless calloutlint comes from this environment's site-packages",
    )


def pytest_configure(config: pytest.Config) -> None:
    home = Path(calloutlint.__file__).parent
    if config.getoption("--installed") and not home.is_relative_to(sys.prefix):
        raise pytest.UsageError(f"calloutlint comes from {home}, not from the installed wheel")


def pytest_report_header() -> str:
    return f"calloutlint: {calloutlint.__version__} from {Path(calloutlint.__file__).parent}"


@pytest.fixture(scope="session")
def project() -> Path:
    """The folder that holds README.md, pyproject.toml and tests."""
    return PROJECT


@pytest.fixture(scope="session", autouse=True)
def _own_cache(tmp_path_factory: pytest.TempPathFactory) -> Iterator[None]:
    """What the program keeps from run to run is built anew, and the user's own is left alone."""
    with pytest.MonkeyPatch.context() as environment:
        environment.setenv("XDG_CACHE_HOME", str(tmp_path_factory.mktemp("cache")))
        yield
