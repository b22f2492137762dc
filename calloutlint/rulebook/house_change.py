"""What a house sheet changed in a rule, for whoever reads the findings."""

from typing import NamedTuple


class HouseChange(NamedTuple):
    """A rule that a house sheet changed; `done` is `retired`, or `amended` with what is now and was before."""

    rule: str
    done: str
    why: str
    file: str

    @property
    def told(self) -> str:
        """The change in one sentence."""
        return f"{self.rule} {self.done}, because: {self.why.strip().rstrip('.')}."
