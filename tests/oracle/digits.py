"""Arithmetic with many digits: numbers, pi, sines, Gauss points and a small dense solver.

Everything works at the precision of the decimal context in force; `working` opens one.
A float means its exact binary value; to mean a short decimal, pass its text or a Decimal.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from contextlib import contextmanager
from decimal import Decimal, getcontext, localcontext
from functools import lru_cache

Number = int | float | str | Decimal
Vector = list[Decimal]
Matrix = list[list[Decimal]]

ZERO = Decimal(0)
ONE = Decimal(1)
GUARD = 36
"""Digits carried beyond the wanted ones; strongly stepped chains lose about twenty of them."""


class LooseChainError(ArithmeticError):
    """A pivot vanished: something in the chain can move without a force."""


@contextmanager
def working(digits: int) -> Iterator[int]:
    """Open a decimal context for `digits` wanted digits and yield the working precision."""
    with localcontext() as context:
        context.prec = digits + GUARD
        yield context.prec


def number(value: Number) -> Decimal:
    """Take a number as a Decimal, exactly."""
    return value if isinstance(value, Decimal) else Decimal(value)


def numbers(values: Sequence[Number]) -> Vector:
    """Take a sequence of numbers as Decimals, exactly."""
    return [number(value) for value in values]


def pi() -> Decimal:
    """Give pi at the context's precision (Machin 1706: pi/4 = 4 arctan 1/5 - arctan 1/239)."""
    return +_pi(getcontext().prec)


@lru_cache(maxsize=16)
def _pi(precision: int) -> Decimal:
    with localcontext() as context:
        context.prec = precision + 5
        return 4 * (4 * arctan(ONE / 5) - arctan(ONE / 239))


def arctan(x: Decimal) -> Decimal:
    """Sum the arctangent's series at zero; meant for |x| < 1/2."""
    total, power, k = ZERO, x, 1
    while abs(power) > abs(x) * Decimal(10) ** -(getcontext().prec + 3):
        total += power / k
        power *= -x * x
        k += 2
    return total


def cos_sin(degrees: Number) -> tuple[Decimal, Decimal]:
    """Give cosine and sine of an angle in degrees (Taylor series at zero)."""
    with localcontext() as context:
        context.prec += 8
        angle = number(degrees).remainder_near(Decimal(360)) * pi() / 180
        smallest = Decimal(10) ** -context.prec
        sums, term, k = [ZERO, ZERO], ONE, 0
        while abs(term) > smallest or k < 8:
            sums[k % 2] += term if k % 4 < 2 else -term
            k += 1
            term = term * angle / k
    return +sums[0], +sums[1]


@lru_cache(maxsize=32)
def gauss_points(count: int, precision: int) -> tuple[tuple[Decimal, Decimal], ...]:
    """Give (place, weight) of the Gauss-Legendre rule on 0..1, by Newton on P_n (recurrence of Bonnet)."""
    points = []
    with localcontext() as context:
        context.prec = precision + 8
        for k in range(count):
            x, step = Decimal(math.cos(math.pi * (k + 0.75) / (count + 0.5))), ONE
            while abs(step) > Decimal(10) ** -(precision + 4):
                before, value = ONE, x
                for n in range(2, count + 1):
                    before, value = value, ((2 * n - 1) * x * value - (n - 1) * before) / n
                slope = count * (before - x * value) / (1 - x * x)
                step = value / slope
                x -= step
            points.append(((1 - x) / 2, 1 / ((1 - x * x) * slope * slope)))
    return tuple(points)


def product(a: Matrix, b: Matrix) -> Matrix:
    """Multiply two matrices."""
    columns = list(zip(*b, strict=True))
    return [[sum(map(Decimal.__mul__, row, column), ZERO) for column in columns] for row in a]


def times(a: Matrix, x: Vector) -> Vector:
    """Multiply a matrix with a vector."""
    return [sum(map(Decimal.__mul__, row, x), ZERO) for row in a]


def transposed(a: Matrix) -> Matrix:
    """Swap rows and columns."""
    return [list(column) for column in zip(*a, strict=True)]


def zeros(rows: int, columns: int) -> Matrix:
    """Give a matrix of zeros."""
    return [[ZERO] * columns for _ in range(rows)]


def solve(a: Matrix, b: Matrix, scale: Vector) -> Matrix:
    """Solve a x = b by Gauss elimination with scaled partial pivoting.

    `scale` holds for each row the size of the terms it was summed from, so that a row of
    mere rounding noise is recognised.

    Raises
    ------
    LooseChainError
        If every candidate for a pivot is noise.
    """
    size = len(a)
    floor = Decimal(10) ** -(getcontext().prec - 10)
    rows = [list(left) + list(right) for left, right in zip(a, b, strict=True)]
    weight = list(scale)
    for k in range(size):
        best = max(range(k, size), key=lambda i: abs(rows[i][k]) / weight[i] if weight[i] else ZERO)
        if not weight[best] or abs(rows[best][k]) <= floor * weight[best]:
            raise LooseChainError(f"pivot {k} of {size} vanishes")
        rows[k], rows[best] = rows[best], rows[k]
        weight[k], weight[best] = weight[best], weight[k]
        pivot, tail = rows[k][k], rows[k][k + 1 :]
        for row in rows[k + 1 :]:
            if row[k]:
                factor = row[k] / pivot
                row[k + 1 :] = [value - factor * above for value, above in zip(row[k + 1 :], tail, strict=True)]
    for k in reversed(range(size)):
        row, pivot = rows[k], rows[k][k]
        for j in range(size, len(row)):
            known = sum((row[i] * rows[i][j] for i in range(k + 1, size)), ZERO)
            row[j] = (row[j] - known) / pivot
    return [row[size:] for row in rows]
