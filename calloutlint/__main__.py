"""Runs the command line for `python -m calloutlint`."""

import sys

from calloutlint.cli import main

if __name__ == "__main__":
    sys.exit(main())
