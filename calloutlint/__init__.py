"""calloutlint: checks the tolerance callouts of mechanical drawings."""

__version__ = "0.1.0"
