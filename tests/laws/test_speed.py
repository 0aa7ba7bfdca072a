"""One answer of 1,000 bearings costs a small multiple of 1,000 stacked 5 x 5 solutions (a ratio, no time)."""

from __future__ import annotations

from benchmarks.bearing_laws import ball_ratio

GENEROUS = 12.0  # about 3 on a quiet machine


def test_ball_law_against_stacked_solutions() -> None:
    ours, theirs, ratio = ball_ratio()
    print(f"\n1,000 ball bearings {ours:.2f} ms, 1,000 solutions 5 x 5 {theirs:.2f} ms, ratio {ratio:.2f}")
    assert ratio < GENEROUS
