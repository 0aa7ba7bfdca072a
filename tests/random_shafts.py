"""Random shafts as plain data, for tests of many kinds; each seed gives one shaft.

All lengths are whole micrometres and all numbers short decimals, so that a number's text and its float
mean the same. Imports nothing of the package under test.

`random_shaft(seed)` draws, `to_oracle(spec)` describes it for the independent solution, `truth(spec)` solves it.
"""

from __future__ import annotations

import math
import random
from collections.abc import Sequence
from dataclasses import dataclass
from decimal import Decimal

from tests.oracle.shaft_spec import (
    DIRECTIONS,
    CaseSpec,
    ForceSpec,
    SegmentSpec,
    ShaftSpec,
    Six,
    SupportSpec,
    Truth,
    exact,
    to_oracle,
    truth,
    wrench,
)

__all__ = [
    "DIRECTIONS",
    "EXTREME",
    "HARD",
    "CaseSpec",
    "ForceSpec",
    "Reach",
    "SegmentSpec",
    "ShaftSpec",
    "SupportSpec",
    "Truth",
    "exact",
    "random_shaft",
    "to_oracle",
    "truth",
    "wrench",
]

GRID = 1_000_000
"""Positions and lengths are counted in 1/GRID metres."""


@dataclass(frozen=True, slots=True)
class Reach:
    """From where to where the numbers go [m, N/m]; lengths are ratio times diameter if `ratio` is given."""

    diameter: tuple[float, float] = (5e-3, 200e-3)
    length: tuple[float, float] = (2e-3, 500e-3)
    stiffness: tuple[float, float] = (1e6, 1e10)
    segments: tuple[int, int] = (2, 40)
    gap: float = 2e-3
    ratio: tuple[float, float] | None = None


HARD = Reach()
"""The range in which plain assembly in double precision loses up to eleven digits."""
EXTREME = Reach((1e-4, 10.0), (1e-6, 1e3), (1e2, 1e16), gap=5e-4, ratio=(0.01, 100.0))
"""Far beyond any real shaft."""


def random_shaft(seed: int, reach: Reach = HARD) -> ShaftSpec:
    """Draw a shaft; the same seed and reach always give the same one."""
    return _Draw(seed, reach).shaft()


class _Draw:
    """The drawing of one shaft: random source, range, and the stations taken so far (in 1/GRID m)."""

    def __init__(self, seed: int, reach: Reach) -> None:
        self.seed = seed
        self.random = random.Random(seed)
        self.reach = reach
        self.gap = round(reach.gap * GRID)
        self.taken: list[int] = []
        self.ends: list[int] = []

    def shaft(self) -> ShaftSpec:
        shear_choice = self.random.random()
        segments = self.segments()
        supports = self.supports()
        forces, cases = self.loads(any("spin" in support.holds for support in supports))
        return ShaftSpec(
            seed=self.seed,
            segments=segments,
            youngs_modulus=self.random.choice([206e9, 210e9, 110e9, 70e9]),
            poisson_ratio=self.random.choice([0.28, 0.3, 0.34]),
            density=self.random.choice([7850.0, 7200.0, 2700.0]),
            shear="cowper" if shear_choice < 0.7 else "none" if shear_choice < 0.85 else self.evenly(0.5, 1.0, 3),
            supports=supports,
            forces=forces,
            cases=cases,
            gravity=self.gravity() if self.chance(0.3) else (0.0, 0.0, 0.0),
        )

    # numbers
    def chance(self, share: float) -> bool:
        return self.random.random() < share

    def evenly(self, low: float, high: float, decimals: int) -> float:
        return round(self.random.uniform(low, high), decimals)

    def log(self, low: float, high: float, digits: int = 4) -> float:
        value = math.exp(self.random.uniform(math.log(low), math.log(high)))
        return float(f"{min(max(value, low), high):.{digits - 1}e}")

    def signed(self, low: float, high: float, share: float = 1.0) -> float:
        size = self.log(low, high, 3)
        return self.random.choice([-1.0, 1.0]) * size if self.chance(share) else 0.0

    # the body
    def segments(self) -> tuple[SegmentSpec, ...]:
        hollow, coned = self.chance(0.35), self.chance(0.35)
        count = self.random.randint(*self.reach.segments)
        while True:
            drawn = tuple(self.segment(hollow, coned) for _ in range(count))
            self.ends = [0]
            for segment in drawn:
                self.ends.append(self.ends[-1] + round(segment.length * GRID))
            if self.ends[-1] > 10 * self.gap:
                return drawn

    def segment(self, hollow: bool, coned: bool) -> SegmentSpec:
        low, high = self.reach.diameter
        diameter, end = self.log(low, high), None
        if coned and self.chance(0.4):
            end = min(max(self.log(diameter / 3, diameter * 3), low), high)
        bore, end_bore = 0.0, None
        if hollow and self.chance(0.7):
            bore = self.short(self.evenly(0.1, 0.85, 3) * (diameter if end is None else min(diameter, end)))
            if end is not None and self.chance(0.5):
                end_bore = self.short(self.evenly(0.1, 0.85, 3) * end)
        length = self.log(*self.reach.length)
        if self.reach.ratio is not None:
            length = diameter * self.log(*self.reach.ratio)
        return SegmentSpec(max(round(length * GRID), 1) / GRID, diameter, end, bore, end_bore)

    @staticmethod
    def short(value: float) -> float:
        return float(f"{value:.3e}")

    def place(self, apart: bool) -> int:
        """Draw a station: an end, a step or anywhere; off the others by the gap, or (not `apart`) on one."""
        total, tries = self.ends[-1], 0
        while True:
            tries += 1
            kind = self.random.random()
            if kind < 0.1:
                at = self.random.choice([0, total])
            elif kind < 0.4:
                at = self.random.choice(self.ends)
            else:
                at = self.random.randint(0, total)
            if not apart and self.taken and (kind > 0.9 or tries > 50):
                return self.random.choice(self.taken)
            if all(abs(at - other) >= self.gap for other in self.taken):
                self.taken.append(at)
                return at

    # what holds it
    def supports(self) -> tuple[SupportSpec, ...]:
        count = self.random.choice([2, 2, 2, 3, 3, 4])
        count = min(count, 1 + self.ends[-1] // (3 * self.gap))
        places = sorted(self.place(apart=True) for _ in range(count))
        locating = self.random.randrange(count)
        spinning = self.random.randrange(count) if self.chance(0.4) else -1
        pinned = self.chance(0.2)
        centres: list[int] = []
        drawn = []
        for k, at in enumerate(places):
            shift = self.centre(at, centres, places[k + 1 :])
            centres.append(at + shift)
            holds = ("radial", *(["axial"] * (k == locating)), *(["spin"] * (k == spinning)))
            pin = pinned or self.chance(0.1)
            drawn.append(self.support(f"support_{k + 1}", at / GRID, holds, pin, shift / GRID))
        return tuple(drawn)

    def centre(self, at: int, before: Sequence[int], after: Sequence[int]) -> int:
        """Draw a load centre that keeps off the other supports'."""
        # A neighbour's centre may have come near; then only this one's own shift can make room.
        if not self.chance(0.15) and all(abs(at - other) >= self.gap for other in before):
            return 0
        while True:
            shift = self.random.randint(-20 * self.gap, 20 * self.gap)
            if all(abs(at + shift - other) >= self.gap for other in (*before, *after)):
                return shift

    def support(self, name: str, x: float, holds: tuple[str, ...], pin: bool, shift: float) -> SupportSpec:
        if pin and self.chance(0.15):
            holds = (*holds, "tilt")
        offset = self.log(1e-6, 1e-4, 3) if self.chance(0.06) else 0.0
        tilt = self.log(1e-5, 1e-3, 3) if self.chance(0.04) else 0.0
        angles = [self.evenly(0.0, 359.9, 1) for _ in range(2)]
        matrix = self.matrix() if not pin and self.chance(0.1) else None
        stiffness = None if pin or matrix is not None else self.stiffness("axial" in holds, 0.3)
        seat = None
        if not pin and self.chance(0.3):
            seat = self.stiffness(self.chance(0.5), 0.4)
        if matrix is not None:
            holds = tuple(dict.fromkeys((*holds, "axial")))
        return SupportSpec(
            name, x, holds, stiffness, matrix, seat, shift,
            offset, angles[0] if offset else 0.0, tilt, angles[1] if tilt else 0.0,
        )  # fmt: skip

    def stiffness(self, axial: bool, tilt_share: float) -> dict[str, float]:
        names = ["radial"] if self.chance(0.7) else ["up", "front"]
        drawn = {name: self.log(*self.reach.stiffness) for name in names}
        if axial:
            drawn["axial"] = self.log(*self.reach.stiffness)
        if self.chance(tilt_share):
            for name in ["tilt"] if self.chance(0.6) else ["tilt_up", "tilt_front"]:
                low, high = self.reach.stiffness
                drawn[name] = self.log(low * 1e-4, high * 1e-3)
        return drawn

    def matrix(self) -> tuple[Six, ...]:
        """Draw a full bearing matrix: springs along tilted principal axes at some way from the centre.

        Positive definite without the spin: the tilt keeps at least a hundredth of what the arm makes.
        """
        k1, k2, axial = (self.log(*self.reach.stiffness) for _ in range(3))
        arm, turn = self.evenly(-0.02, 0.02, 4), self.random.uniform(0.0, math.pi)
        c, s = math.cos(turn), math.sin(turn)
        yy, zz, yz = k1 * c * c + k2 * s * s, k1 * s * s + k2 * c * c, (k1 - k2) * c * s
        tilt = self.log(0.01, 1.0) * max(k1, k2) * max(arm * arm, 1e-4)
        k = [[0.0] * 6 for _ in range(6)]
        k[0][0], k[1][1], k[2][2], k[1][2] = axial, yy, zz, yz
        # u_y = uy + arm rz, u_z = uz - arm ry at the springs
        k[1][5], k[1][4], k[2][5], k[2][4] = arm * yy, -arm * yz, arm * yz, -arm * zz
        k[4][4], k[5][5], k[4][5] = arm * arm * zz + tilt, arm * arm * yy + tilt, -arm * arm * yz
        for i in range(6):
            for j in range(i, 6):
                k[i][j] = k[j][i] = float(f"{k[i][j]:.11e}")
        return tuple((r[0], r[1], r[2], r[3], r[4], r[5]) for r in k)

    # what pulls at it
    def loads(self, spin_is_held: bool) -> tuple[tuple[ForceSpec, ...], tuple[CaseSpec, ...]]:
        # The first force always acts, and off the supports, so that something moves in every case.
        forces = [self.force(f"force_{k + 1}", apart=k == 0) for k in range(self.random.randint(1, 3))]
        cases = []
        balances = []
        for k in range(self.random.randint(1, 3)):
            acting = [force for force in forces if force is forces[0] or self.chance(0.7)]
            factors = {force.name: self.random.choice([-1, 1]) * self.evenly(0.1, 2.0, 2) for force in acting}
            torque = sum(Decimal(repr(factors[force.name])) * wrench(force)[3] for force in acting)
            if torque and not spin_is_held:
                place = self.random.choice(forces)
                name = f"balance_{k + 1}"
                balances.append(ForceSpec(name, place.x, couple_axial=-float(torque), spread=place.spread))
                factors[name] = 1.0
            cases.append(CaseSpec(f"case_{k + 1}", factors))
        return (*forces, *balances), tuple(cases)

    def force(self, name: str, apart: bool) -> ForceSpec:
        at = self.place(apart)
        room = min(at, self.ends[-1] - at, 25 * self.gap)
        half = self.random.randint(self.gap // 2, room) if self.chance(0.3) and room > self.gap // 2 else 0
        radius = self.evenly(0.0, 0.15, 4) if self.chance(0.6) else 0.0
        return ForceSpec(
            name,
            at / GRID,
            up=self.signed(10.0, 1e5, 0.9),
            front=self.signed(10.0, 1e5),
            axial=self.signed(10.0, 1e5, 0.5),
            couple_up=self.signed(1.0, 1e4, 0.3),
            couple_front=self.signed(1.0, 1e4, 0.3),
            couple_axial=self.signed(1.0, 1e4, 0.4),
            radius=radius,
            angle=self.evenly(0.0, 359.9, 1) if radius else 0.0,
            spread=2 * half / GRID,
        )

    def gravity(self) -> tuple[float, float, float]:
        direction = [self.random.gauss(0.0, 1.0) for _ in range(3)]
        size = math.hypot(*direction)
        x, y, z = (round(9.80665 * part / size, 5) for part in direction)
        return x, y, z
