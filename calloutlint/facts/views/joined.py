"""What every hole of a fastener can say, stated by a joint or taken for one: its joint, its fastener."""

from __future__ import annotations

from typing import TYPE_CHECKING

from calloutlint.facts.view import fact
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.facts.views.located import is_located
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import Callout
from calloutlint.model.fastener import Fastener

if TYPE_CHECKING:
    from calloutlint.facts.views.callout import CalloutView
    from calloutlint.facts.views.joint import JointView


class JoinedView(PartView):
    """A hole with its fastener, by a stated joint or by assumption."""

    part: Callout

    def __init__(self, callout: CalloutView, fastener: Fastener, joint: JointView | None) -> None:
        super().__init__(callout.part, callout)
        self._fastener = fastener
        self._joint = joint

    @fact
    def joint(self) -> JointView | None:
        """The stated joint; unknown where the hole is only taken for a clearance hole."""
        return self._joint

    @fact
    def fastener(self) -> FastenerView:
        """The fastener that goes through it, or is fixed in it."""
        return FastenerView(self._fastener, self.unit)

    @fact
    def located(self) -> bool | None:
        """Whether something locates it; unknown where a general tolerance may."""
        return is_located(self._callout)
