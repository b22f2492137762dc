"""What a house sheet changed in a rule, for whoever reads the findings."""

from typing import NamedTuple


class HouseChange(NamedTuple):
    """A rule that a house sheet retired or amended; `done` is `retired` or what now stands for what was."""

    rule: str
    done: str
    why: str
    file: str

    @property
    def told(self) -> str:
        """The change in one sentence."""
        return f"{self.rule} {self.done}, because: {self.why.strip().rstrip('.')}."
