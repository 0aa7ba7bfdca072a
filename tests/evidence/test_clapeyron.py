"""B. P. E. Clapeyron, Calcul d'une poutre elastique reposant librement sur des appuis inegalement espaces, C. R. Acad.
Sci. Paris 45 (1857) 1076: the three-moment equation; with settling of supports as in S. P. Timoshenko, Strength of
Materials I (both from memory).

For neighbouring spans l, r with their own E I, moments M (positive where they stretch the side to which y points, here
the side the loads push to), supports displaced by h:

    M_{k-1} L_l/I_l + 2 M_k (L_l/I_l + L_r/I_r) + M_{k+1} L_r/I_r
        = -6 (A_l a_l / L_l I_l + A_r b_r / L_r I_r) - 6 E ((h_{k-1} - h_k) / L_l + (h_{k+1} - h_k) / L_r)

A is the area of the span's own moment diagram under its load, a and b the distances of its centroid from the outer
supports: for a point load P at a from the left 6 A a / L = P a (L^2 - a^2) / L (seen from the right support) and
P b (L^2 - b^2) / L (from the left), for an even load w L^3 / 4. Here h and the loads are both counted along y.

Tolerance 1e-9: the equations are exact for slender beams (shear = "none") and are solved here by numpy.
"""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
import pytest
from numpy.typing import NDArray

import fe_shaft as fs
from tests.evidence.plane import Bent, E, Plane, both_planes, pin, rod, roller, second_moment
from tests.evidence.published import agree, text


@dataclass(frozen=True)
class Span:
    """A span with its own diameter; an even load and a point load at a share of its length."""

    length: float
    d: float
    w: float = 0.0
    p: float = 0.0
    share: float = 0.5

    @property
    def flexible(self) -> float:
        return self.length / second_moment(self.d)

    def load_term(self, *, from_left: bool) -> float:
        """6 A a / (L I), or 6 A b / (L I), of the span's own moment diagram."""
        length = self.length
        a = length * (self.share if from_left else 1 - self.share)
        return (self.w * length**3 / 4 + self.p * a * (length**2 - a**2) / length) / second_moment(self.d)


def three_moments(spans: list[Span], h: list[float]) -> NDArray[np.float64]:
    """Moments at all supports, 0 at the outer ones."""
    n = len(spans)
    matrix, right = np.eye(n + 1), np.zeros(n + 1)
    for k in range(1, n):
        left, own = spans[k - 1], spans[k]
        matrix[k, k - 1 : k + 2] = left.flexible, 2 * (left.flexible + own.flexible), own.flexible
        right[k] = -left.load_term(from_left=True) - own.load_term(from_left=False)
        # A support that moves along y, as the loads do, bends the beam as a smaller reaction would.
        right[k] -= 6 * E * ((h[k - 1] - h[k]) / left.length + (h[k + 1] - h[k]) / own.length)
    return np.linalg.solve(matrix, right)


def reactions(spans: list[Span], moments: NDArray[np.float64]) -> NDArray[np.float64]:
    """Of the supports on the beam, against y, by statics of each span."""
    out = np.zeros(len(spans) + 1)
    for k, span in enumerate(spans):
        turn = (moments[k + 1] - moments[k]) / span.length
        out[k] += span.w * span.length / 2 + span.p * (1 - span.share) + turn
        out[k + 1] += span.w * span.length / 2 + span.p * span.share - turn
    return out


def bend(plane: Plane, spans: list[Span], h: list[float]) -> Bent:
    ends = np.concatenate([[0.0], np.cumsum([span.length for span in spans])]).tolist()
    parts: list[fs.Pin | fs.Force] = []
    for k, (x, move) in enumerate(zip(ends, h, strict=True)):
        angle = plane.clock if move >= 0 else text(plane.degrees + 180, "deg")
        moved = {"offset": text(abs(move), "m"), "offset_angle": angle} if move else {}
        parts.append((roller if k else pin)(f"s{k}", x, **moved))
    for k, span in enumerate(spans):
        if span.w:
            parts.append(plane.even(ends[k], ends[k + 1], span.w, f"even_{k}"))
        if span.p:
            parts.append(plane.force(ends[k] + span.share * span.length, span.p, f"point_{k}"))
    return plane.solve([rod(span.length, span.d) for span in spans], *parts)


FLAT = [0.0] * 6
CASES: dict[str, tuple[list[Span], list[float]]] = {
    "3_supports_even_loads": ([Span(1.0, 0.04, w=900), Span(1.4, 0.04, w=500)], FLAT[:3]),
    "3_supports_point_loads": ([Span(0.8, 0.04, p=2e3, share=0.3), Span(1.2, 0.04, p=1e3, share=0.6)], FLAT[:3]),
    "3_supports_own_diameters": ([Span(0.8, 0.05, p=2e3), Span(1.2, 0.035, w=700)], FLAT[:3]),
    "3_supports_middle_settles": ([Span(1.0, 0.04), Span(1.0, 0.04)], [0.0, 0.4e-3, 0.0]),
    "3_supports_middle_settles_under_load": ([Span(1.0, 0.04, w=900), Span(1.3, 0.045, p=800)], [0.0, -0.2e-3, 0.0]),
    "4_supports": (
        [Span(0.9, 0.04, w=800), Span(1.1, 0.05, p=3e3, share=0.35), Span(0.7, 0.03, w=300, p=500, share=0.8)],
        FLAT[:4],
    ),
    "4_supports_two_settle": (
        [Span(0.9, 0.04, w=800), Span(1.1, 0.05, p=3e3, share=0.35), Span(0.7, 0.03, w=300)],
        [0.0, 0.15e-3, -0.1e-3, 0.0],
    ),
    "4_supports_an_end_settles": ([Span(1.0, 0.04), Span(0.6, 0.04), Span(1.0, 0.04, w=400)], [0.0, 0.0, 0.0, 0.3e-3]),
    "6_supports": ([Span(0.5 + 0.1 * k, 0.03 + 0.004 * k, w=500, p=300 * k, share=0.4) for k in range(5)], FLAT),
}


@both_planes
@pytest.mark.parametrize("name", CASES)
def test_moments_and_reactions(name: str, plane: Plane) -> None:
    spans, h = CASES[name]
    moments = three_moments(spans, h)
    bent = bend(plane, spans, h)
    ends = np.cumsum([span.length for span in spans])
    size = float(np.abs(moments).max())
    for x, moment in zip(ends[:-1].tolist(), moments[1:].tolist(), strict=False):
        agree(bent.moment(x), moment, within=1e-9 * size)
    wanted = reactions(spans, moments)
    for k, reaction in enumerate(wanted.tolist()):
        agree(-bent.reaction(f"s{k}"), reaction, within=1e-9 * float(np.abs(wanted).max()))


@both_planes
def test_settling_of_the_middle_support_in_words(plane: Plane) -> None:
    """Two equal spans, the middle support moved by h: M = 3 E I h / L^2 (from memory)."""
    h, length = 0.4e-3, 1.0
    bent = bend(plane, *CASES["3_supports_middle_settles"])
    agree(bent.moment(length), 3 * E * second_moment(0.04) * h / length**2)
    agree(bent.reaction("s1"), 6 * E * second_moment(0.04) * h / length**3)
    agree(bent.y(length), h)


@both_planes
def test_two_equal_spans_even_load(plane: Plane) -> None:
    """w L^2 / 8 over the middle support, reactions 3/8, 10/8, 3/8 (from memory)."""
    bent = bend(plane, [Span(1.0, 0.04, w=900), Span(1.0, 0.04, w=900)], FLAT[:3])
    agree(-bent.moment(1.0), 900 / 8)
    for support, share in {"s0": 3 / 8, "s1": 10 / 8, "s2": 3 / 8}.items():
        agree(-bent.reaction(support), 900 * share)
