"""The shape of the project that its readers rely on."""

import re
from importlib.metadata import version
from pathlib import Path

import calloutlint

LONGEST_MODULE = 500

PACKAGE = Path(calloutlint.__file__).parent


def test_the_installed_version_is_the_one_in_the_code() -> None:
    assert version("calloutlint") == calloutlint.__version__


def test_the_package_says_that_it_is_typed() -> None:
    assert (PACKAGE / "py.typed").is_file()


def test_no_module_is_too_long_to_read(project: Path) -> None:
    modules = [*PACKAGE.rglob("*.py"), *(project / "tests").rglob("*.py")]
    lengths = {path.name: len(path.read_text(encoding="utf-8").splitlines()) for path in modules}
    assert lengths
    assert {name: length for name, length in lengths.items() if length > LONGEST_MODULE} == {}


def test_every_place_that_the_guides_name_is_there(project: Path) -> None:
    guides = "".join((project / name).read_text(encoding="utf-8") for name in ("README.md", "DEVELOPERS.md"))
    named = set(re.findall(r"`(?:calloutlint/)?((?:\w+/)+(?:\w+\.\w+)?)`", guides))
    assert len(named) > 10
    assert {
        place for place in named if not any((root / place).exists() for root in (project, PACKAGE))
    } == set()
