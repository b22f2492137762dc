"""A terminal that may show colours."""

from typing import TextIO

from rich import console
from rich.text import Text


class Console(console.Console):
    """Prints lines of text as they are, in the colours that the terminal can show."""

    def __init__(self, stream: TextIO, width: int | None) -> None:
        """Write to `stream`, `width` columns wide (None: as wide as the terminal)."""
        super().__init__(file=stream, width=width, markup=False, highlight=False, emoji=False)
        self.size = self.size  # asked once, not for every line

    def show(self, text: Text) -> None:
        """Print one line, as wide as it is."""
        self.print(text, soft_wrap=True)

    def on_broken_pipe(self) -> None:
        """Leave it to the command what a closed pipe means, where rich would end the process."""
        raise BrokenPipeError
