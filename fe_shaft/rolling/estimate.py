"""From catalogue figures of any type to what is inside."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from functools import lru_cache
from types import MappingProxyType

from fe_shaft.rolling import angled_balls, deep_groove, roller_estimates
from fe_shaft.rolling.inside import Catalogue, Estimate
from fe_shaft.rolling.kinds import Kind

RULES: Mapping[Kind, Callable[[Catalogue], Estimate]] = MappingProxyType(
    {
        Kind.DEEP_GROOVE_BALL: deep_groove.estimate,
        Kind.ANGULAR_CONTACT_BALL: angled_balls.angular_contact,
        Kind.SELF_ALIGNING_BALL: angled_balls.self_aligning,
        Kind.CYLINDRICAL_ROLLER: roller_estimates.cylindrical,
        Kind.NEEDLE_ROLLER: roller_estimates.needle,
        Kind.TAPERED_ROLLER: roller_estimates.tapered,
        Kind.SPHERICAL_ROLLER: roller_estimates.spherical,
    }
)


@lru_cache(maxsize=256)
def estimate(kind: Kind, catalogue: Catalogue) -> Estimate:
    """Inner geometry of a bearing, estimated from what is given of it.

    Parameters
    ----------
    kind : type
    catalogue : d and D at least, all in SI

    Returns
    -------
    Estimate
        Never a maker's data: a label beside it must say so.

    Raises
    ------
    ModelError
        Where a figure that the type cannot do without is missing or contradicts another.
    """
    return RULES[kind](catalogue)
