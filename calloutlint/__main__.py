"""Where a run starts, as `calloutlint` or as `python -m calloutlint`."""

import sys

INTERRUPTED = 2


def run() -> int:
    """Run the command line and give its exit status; an interrupt is told in a line, however early it comes."""
    try:
        from calloutlint.cli import main  # here, so that modules are loaded where an interrupt is met

        return main()
    except KeyboardInterrupt:
        sys.stderr.write("calloutlint: Interrupted.\n")
        return INTERRUPTED


if __name__ == "__main__":
    sys.exit(run())
