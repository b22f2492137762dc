"""The shape of the project that its readers rely on."""

from importlib.metadata import version
from pathlib import Path

import calloutlint

LONGEST_MODULE = 500


def test_the_installed_version_is_the_one_in_the_code() -> None:
    assert version("calloutlint") == calloutlint.__version__


def test_the_package_says_that_it_is_typed() -> None:
    assert (Path(calloutlint.__file__).parent / "py.typed").is_file()


def test_no_module_is_too_long_to_read(project: Path) -> None:
    modules = [*Path(calloutlint.__file__).parent.rglob("*.py"), *(project / "tests").rglob("*.py")]
    lengths = {path.name: len(path.read_text(encoding="utf-8").splitlines()) for path in modules}
    assert lengths
    assert {name: length for name, length in lengths.items() if length > LONGEST_MODULE} == {}
