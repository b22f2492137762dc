"""Errors that a user sees: what is wrong, where, and what was expected."""


class CalloutlintError(Exception):
    """The run cannot be done. The message is one or more plain sentences, ready to print."""


class SheetError(CalloutlintError):
    """A drawing, sheet or package file cannot be read at all."""


class RuleSheetError(CalloutlintError):
    """A rule sheet is broken: file, key, and for a condition the place with a caret."""
