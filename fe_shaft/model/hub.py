"""Hubs: how much of the flexibility of the shaft under it what sits on it takes away."""

from typing import Annotated, Any, Literal

from typing_extensions import override

from fe_shaft.model.kinds import Kind, shown
from fe_shaft.model.refusal import refuse
from fe_shaft.units import Value

NONE, ONE_PIECE = "none", "one piece"
_SHARES = {NONE: 0.0, ONE_PIECE: 1.0}


class HubKind(Kind):
    """How much of a hub works with the shaft: ``none``, ``one piece`` or a share in between."""

    caption = "none | one piece | number"

    @override
    def check(self, raw: Any) -> str | float:
        if isinstance(raw, str) and raw in _SHARES:
            return str(raw)
        if isinstance(raw, bool) or not isinstance(raw, int | float) or not 0.0 < raw < 1.0:
            raise refuse(
                f'{shown(raw)} says nothing about a hub. Write "none", "one piece", or the share of its stiffening '
                "that it brings, such as 0.5."
            )
        return float(raw)

    @override
    def json(self) -> dict[str, Any]:
        share = {"type": "number", "exclusiveMinimum": 0, "exclusiveMaximum": 1}
        return {"anyOf": [{"enum": list(_SHARES)}, share]}


Hub = Annotated[str | float, HubKind()]


def share_of(hub: str | float | None) -> float:
    """Share of its stiffening that a hub brings; 0 where nothing is written."""
    if isinstance(hub, str):
        return _SHARES[hub]
    return hub or 0.0


def hub_end(which: Literal["low", "high"]) -> str:
    """The end of the band of an assumed share."""
    return NONE if which == "low" else ONE_PIECE


def hub_figure(share: float) -> Value:
    """An assumed share as an estimate between none and one piece."""
    return Value(share, f"{share:g}", 0.0, 1.0)
