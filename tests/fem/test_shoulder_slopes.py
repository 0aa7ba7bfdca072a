"""Exact slopes of lumps and places against differences of the fourth order."""

import numpy as np
import pytest

from fe_shaft.fem.shoulders.contour import Contour
from fe_shaft.fem.shoulders.end_slopes import limited_slopes
from fe_shaft.fem.shoulders.lumps import shoulder_lumps
from fe_shaft.fem.shoulders.pieces import limited
from fe_shaft.fem.shoulders.rule import MODES, flexibility, flexibility_slopes, thickness, thickness_slope
from fe_shaft.fem.shoulders.slopes import BORE, DIAMETER, PARAMETERS, lump_slopes

#: Two, of 30 mm: the larger is exact where the smaller is noisy, the smaller where a switch is near.
STEPS = (1e-5, 1e-6)
WEIGHTS, OFFSETS = np.array([-1, 8, -8, 1]) / 12, np.array([2, 1, -1, -2])
FIELDS = ("bending_place", *MODES)


def contours(rng, count, n, *, hollow, sharp, cones):
    """Random shafts of n segments, none equal to its neighbour: lengths and diameters in mm."""
    shape = (count, n)
    diameter, bore = rng.uniform(20, 60, shape), np.zeros(shape)
    end, end_bore = diameter, bore
    if hollow:
        bore = end_bore = rng.uniform(2, 18, shape)
    if cones:
        end, end_bore = rng.uniform(20, 60, shape), rng.uniform(2, 18, shape) if hollow else bore
    fillets = np.zeros((2, *shape)) if sharp else rng.uniform(0.2, 2, (2, *shape))
    length = rng.uniform(5, 60, shape)
    return Contour.of(length, diameter, bore, *fillets, end_diameter=end, end_bore=end_bore)


def differences(contour, step, *, together):
    """Slopes by differences, (5, v, n, 2, 7, n); `together`: both ends of a cylinder at once, in place of the left."""
    n = contour.shape[1]
    arrays = [np.tile(values[:, None, None, None], (1, len(PARAMETERS), n, 4, 1)) for values in contour.arrays]
    for i in range(len(PARAMETERS)):
        for k in range(n):
            change = step * OFFSETS
            if not together or i not in (DIAMETER + 1, BORE + 1):
                arrays[i][:, i, k, :, k] += change
            if together and i in (DIAMETER, BORE):
                arrays[i + 1][:, i, k, :, k] += change
    lumps = shoulder_lumps(Contour(*arrays))
    found = np.array([getattr(lumps, field) for field in FIELDS])
    return np.einsum("fvpkhes,h->fvespk", found, WEIGHTS, optimize=True) / step


def worst(contour, *, hollow, sharp, cones):
    """Largest error of a lump's slope, times 30 mm and over the largest lump of its mode; of a place as it is."""
    slopes, lumps = lump_slopes(contour), shoulder_lumps(contour)
    exact = np.array([getattr(slopes, field) for field in FIELDS])
    places = np.full(len(contour.length), 30.0)
    scale = np.array([places, *(np.abs(getattr(lumps, mode)).max(axis=(1, 2)) for mode in MODES)])
    if not cones:
        for i in (DIAMETER, BORE):
            exact[..., i, :] += exact[..., i + 1, :]
    left_out = [*([] if cones else [DIAMETER + 1, BORE + 1]), *([] if hollow else [BORE, BORE + 1]), *([5, 6] * sharp)]
    checked = [i for i in range(len(PARAMETERS)) if i not in left_out]
    gaps = [np.abs(exact - differences(contour, 30 * step, together=not cones)) for step in STEPS]
    return np.minimum(*gaps)[..., checked, :].max(axis=(2, 3, 4, 5)) * 30 / scale


@pytest.mark.parametrize("sharp", [False, True])
@pytest.mark.parametrize("hollow", [False, True])
def test_slopes_of_a_thousand_shafts(hollow, sharp):
    rng = np.random.default_rng(17)
    kind = {"hollow": hollow, "sharp": sharp, "cones": False}
    for n in (2, 3, 4, 6):
        assert worst(contours(rng, 63, n, **kind), **kind).max() < 1e-6


@pytest.mark.parametrize("sharp", [False, True])
@pytest.mark.parametrize("hollow", [False, True])
def test_slopes_of_cones(hollow, sharp):
    kind = {"hollow": hollow, "sharp": sharp, "cones": True}
    assert worst(contours(np.random.default_rng(18), 6, 3, **kind), **kind).max() < 1e-6


def test_a_bore_throughout_may_be_drilled_wider():
    """All bores at once: equal ones that stay equal."""
    contour = Contour.of([40, 30, 25], [30, 45, 36], 10, 1, 1)
    slopes = lump_slopes(contour)
    wider = [shoulder_lumps(Contour.of([40, 30, 25], [30, 45, 36], 10 + h, 1, 1)) for h in 1e-3 * OFFSETS]
    for field in FIELDS:
        found = np.einsum("hks,h->ks", [getattr(lumps, field) for lumps in wider], WEIGHTS) / 1e-3
        exact = getattr(slopes, field)[..., BORE : BORE + 2, :].sum(axis=(-1, -2))
        np.testing.assert_allclose(exact, found, rtol=1e-6, atol=1e-9 * np.abs(found).max())


def test_many_at_once_and_segments_of_no_length():
    contour = contours(np.random.default_rng(4), 20, 4, hollow=True, sharp=False, cones=False)
    filled = contour.map(lambda values: np.insert(values, 2, 0.5 * values[:, 1], axis=1))
    filled.length[:, 2] = 0
    kept = [0, 1, 3, 4]
    together, one = lump_slopes(filled), lump_slopes(contour.map(lambda values: values[7]))
    for found, expected in zip(together, one, strict=True):
        assert (found[..., 2, :, :, :] == 0).all() or found is together.bending_place
        part = found[7][kept][..., kept]
        np.testing.assert_allclose(part, expected, rtol=1e-9, atol=1e-12 * np.abs(expected).max())


def test_sections_and_limits():
    d, b, nu = np.full((4, 1), 30.0), np.full((4, 1), 13.0), np.array([0.3])
    for slope, change in zip(flexibility_slopes(d, b, nu), ((1, 0), (0, 1)), strict=True):
        one, other = (flexibility(d + change[0] * h, b + change[1] * h, nu) for h in (1e-4, -1e-4))
        np.testing.assert_allclose(slope, (one - other) / 2e-4, rtol=1e-7)
    mu = np.full((4, 1), 0.4)
    by_mu = (np.log(thickness(mu + 1e-6)) - np.log(thickness(mu - 1e-6))) / 2e-6
    np.testing.assert_allclose(thickness_slope(mu), by_mu, rtol=1e-8)
    by_length, by_limit = limited_slopes(np.array([2.0, 0.0]), np.array([3.0, 3.0]))
    assert by_length[1] == 1
    two, three, h = np.array(2.0), np.array(3.0), 1e-6
    at = limited(two, three)
    assert by_length[0] == pytest.approx((limited(two + h, three) - at) / h, rel=1e-5)
    assert by_limit[0] == pytest.approx((limited(two, three + h) - at) / h, rel=1e-5)
