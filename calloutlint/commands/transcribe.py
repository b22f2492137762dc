"""`transcribe`: any input as a callout sheet in canonical text."""

import sys
from argparse import Namespace
from collections.abc import Sequence
from pathlib import Path
from typing import TYPE_CHECKING

from calloutlint.commands.arguments import Subparsers, paths_argument, plain_option
from calloutlint.errors import CalloutlintError

if TYPE_CHECKING:
    from calloutlint.model.drawing import Drawing


def add(commands: Subparsers) -> None:
    """Add `transcribe` to the commands."""
    parser = commands.add_parser(
        "transcribe",
        help="write sheets in canonical text",
        description="Write each drawing as a callout sheet in canonical text. Comments ('# ...') are left out.",
    )
    paths_argument(parser)
    parser.add_argument(
        "--into", type=Path, metavar="FILE", help="write to FILE; for several drawings, a folder that is there"
    )
    plain_option(parser)
    parser.set_defaults(run=run)


def run(options: Namespace) -> int:
    """Transcribe the drawings that the options name; the exit status."""
    import os

    from calloutlint._whole import write_whole
    from calloutlint.callouts.write import Style
    from calloutlint.reading.package import read_package
    from calloutlint.reading.transcribe import transcribe
    from calloutlint.report.screen import draws_symbols

    drawings = read_package(options.paths).drawings
    if options.into is None:
        ascii_only = options.plain or not draws_symbols(sys.stdout.encoding, os.environ)
        style = Style.ASCII if ascii_only else Style.UNICODE
        sys.stdout.write("\n".join(transcribe(drawing, style) for drawing in drawings))
        return 0
    style = Style.ASCII if options.plain else Style.UNICODE
    for drawing, path in zip(drawings, _targets(drawings, options.into), strict=True):
        write_whole(path, transcribe(drawing, style).encode())
    return 0


def _targets(drawings: Sequence["Drawing"], into: Path) -> list[Path]:
    """The file for each drawing: `into` itself, or a file named like the drawing's own in the folder `into`."""
    if into.is_dir():
        targets = [into / Path(drawing.file).with_suffix(".txt").name for drawing in drawings]
    else:
        targets = [into] * len(drawings)
    if len(drawings) > 1 and not into.is_dir():
        raise CalloutlintError(
            f"There are {len(drawings)} drawings to transcribe: --into must name a folder that is "
            f"there, and '{into}' is none."
        )
    twice = {target.name for target in targets if targets.count(target) > 1}
    if twice:
        raise CalloutlintError(
            f"Two drawings would both become '{twice.pop()}': transcribe them one at a time."
        )
    overwritten = [
        target
        for target, drawing in zip(targets, drawings, strict=True)
        if target.resolve() == Path(drawing.file).resolve()
    ]
    if overwritten:
        raise CalloutlintError(
            f"'{overwritten[0]}' is the sheet itself: --into must name another file or folder."
        )
    return targets
