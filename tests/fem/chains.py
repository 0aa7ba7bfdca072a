"""Small chains of pieces for tests of the beam layer."""

import numpy as np

from fe_shaft.fem.pieces import Pieces, Sections
from fe_shaft.fem.span import Spans, condense, flexibility

E, G, NU, RHO = 210e9, 81e9, 0.3, 7850.0


def chain(lengths, left, right=None, *, bores=None, end_bores=None, spans=None, kappa=np.nan):
    """Pieces in one span (or in the spans given, a number a piece), each a segment of its own."""
    lengths, left = np.asarray(lengths, float), np.asarray(left, float)
    m = len(lengths)
    ones = np.ones(m)
    span = np.zeros(m, dtype=np.intp) if spans is None else np.asarray(spans)
    starts = np.searchsorted(span, np.arange(span[-1] + 1))
    ends = np.cumsum(lengths) - lengths
    bore = 0 * ones if bores is None else np.asarray(bores, float)
    sections = Sections(
        diameter_left=left,
        diameter_right=left if right is None else np.asarray(right, float),
        bore_left=bore,
        bore_right=bore if end_bores is None else np.asarray(end_bores, float),
        youngs_modulus=E * ones,
        shear_modulus=G * ones,
        poisson_ratio=NU * ones,
        density=RHO * ones,
        shear_coefficient=kappa * ones,
    )
    shares = (0 * ones, ones) if right is not None or end_bores is not None else (None, None)
    return Pieces(starts, np.bincount(span), ends - ends[starts][span], lengths, np.arange(m), sections, *shares)


def condensed(pieces: Pieces) -> Spans:
    """Its spans."""
    return condense(pieces, flexibility(pieces), np.add.reduceat(pieces.length, pieces.starts))
