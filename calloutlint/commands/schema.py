"""`record-schema`: the JSON schema of the record that `--report FILE.json` writes."""

import json
import sys
from argparse import Namespace

from calloutlint.commands.arguments import Subparsers


def add(commands: Subparsers) -> None:
    """Add `record-schema` to the commands."""
    parser = commands.add_parser(
        "record-schema",
        help="print the JSON schema of the record",
        description="Print the JSON schema of the record that 'check --report FILE.json' writes.",
    )
    parser.set_defaults(run=run, parser=parser)


def run(_options: Namespace) -> int:
    """Print the schema; the exit status."""
    from calloutlint.report.record import record_schema

    sys.stdout.write(json.dumps(record_schema(), indent=2) + "\n")
    return 0
