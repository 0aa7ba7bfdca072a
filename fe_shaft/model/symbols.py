"""Keys that are none: symbols of drawings and catalogues, keys of a later version, slips of the pen."""

from __future__ import annotations

from collections.abc import Iterable, Mapping

from fe_shaft.errors import nearest, quote

# Symbol -> the keys it may stand for; the first one that the table knows is offered. Symbols as in ISO 21771 (gears),
# ISO 15, 76, 281 (bearings) and on drawings.
SYMBOLS: dict[str, tuple[str, ...]] = {
    "alpha": ("pressure_angle", "thermal_expansion"), "alpha_n": ("pressure_angle",), "alphan": ("pressure_angle",),
    "phi": ("pressure_angle",), "psi": ("helix",), "beta": ("helix",), "mn": ("normal_module",),
    "m_n": ("normal_module",), "m": ("normal_module", "mass"), "module": ("normal_module",),
    "b": ("facewidth", "width", "length"), "face_width": ("facewidth",), "z": ("teeth",), "N": ("teeth", "axial"),
    "d": ("pitch_diameter", "diameter", "bore"), "D": ("diameter", "outside_diameter"), "da": ("diameter",),
    "di": ("bore",), "d_i": ("bore",), "d_a": ("diameter",), "L": ("length",), "l": ("length",),
    "r": ("fillet", "radius"), "R": ("fillet", "radius"), "delta": ("pitch_cone_angle",),
    "hand": ("helix",), "helix_angle": ("helix",), "helix_hand": ("helix",),
    "B": ("width",), "C": ("dynamic_rating",), "Cr": ("dynamic_rating",), "C0": ("static_rating",),
    "C0r": ("static_rating",), "E": ("youngs_modulus",), "G": ("shear_modulus",), "nu": ("poisson_ratio",),
    "mu": ("poisson_ratio",), "rho": ("density",), "alpha_T": ("thermal_expansion",), "cte": ("thermal_expansion",),
    "elastic_modulus": ("youngs_modulus",), "k": ("stiffness", "radial"), "c": ("stiffness", "radial"),
    "kr": ("radial",), "ka": ("axial",), "cr": ("radial",), "ca": ("axial",),
    "P": ("power",), "T": ("torque",), "M": ("torque", "couple"), "Mt": ("torque",), "n": ("speed",),
    "rpm": ("speed",), "KA": ("torque_factor",), "K_A": ("torque_factor",), "Fx": ("axial",), "Fy": ("up",),
    "Fz": ("front",), "Fa": ("axial",), "F": ("up", "belt_pull"), "x": ("at", "profile_shift"), "p": ("chain_pitch",),
    "pitch": ("chain_pitch", "normal_module"), "position": ("at",), "kappa": ("shear",), "a": ("centre_distance",),
    "g": ("gravity",), "colour": (), "color": (),
}  # fmt: skip

_PLAIN = 'Write the figures of the bearing as stiffness = { radial = "...", axial = "..." }.'
_EVERYWHERE = ("range_check", "source")  # keys of any table, not worth listing

# Noun -> key of a later version -> what to do meanwhile.
LATER: dict[str, dict[str, str]] = {
    "Model": {
        "gear_pairs": 'Give each gear its own mate = "9 o\'clock" and module instead.',
        "catalogue": _PLAIN,
        "studies": "Change one value at a time with --set, or write a variant with extends.",
        "sweeps": "Change one value at a time with --set, or write a variant with extends.",
    },
    "Shaft": {
        "beside": 'Write left_end = ["0 mm", "0 mm", "112 mm"].',
        "distance": 'Write left_end = ["0 mm", "0 mm", "112 mm"].',
        "angle": 'Write left_end = ["0 mm", "0 mm", "112 mm"].',
        "along": 'Write left_end = ["0 mm", "0 mm", "112 mm"].',
        "speed": "The speed stands in the case.",
    },
    "Bearing": dict.fromkeys(
        ("catalogue", "table", "dynamic_rating", "static_rating", "outside_diameter", "bore"),
        _PLAIN,
    )
    | dict.fromkeys(
        ("closes_towards", "preload", "housing_tolerance", "temperature"),
        "Leave it out: radial_clearance is that of the bearing as mounted and warm.",
    ),
    "Gear": dict.fromkeys(
        ("profile_shift", "lead_crowning", "helix_slope", "end_relief"),
        "Leave it out: tooth forces act on the reference cylinder.",
    )
    | {
        "centre_distance": "Leave it out: tooth forces act on the reference cylinder.",
        "spiral": "Only straight bevel gears are known.",
        "internal": "Only external gears are known.",
    },
    "Housing": {
        "matrix": "Write seat = { radial = \"...\" } here or at each bearing.",
        "rows": "Write seat = { radial = \"...\" } here or at each bearing.",
        "material": "Leave it out: temperatures are not computed.",
    },
    "Case": {
        "temperature": "Leave it out: temperatures are not computed.",
        "states": "Write each state as a case of its own, with like = \"running\".",
        "time_share": "Leave it out: no life is computed.",
    },
    "Limit": {"bundled": 'Write max = "..." and its source.'},
}  # fmt: skip
LATER["Pin"] = dict.fromkeys(LATER["Bearing"], "A pin gives nothing way; leave it out.")


def unknown_key(key: str, noun: str, examples: Mapping[str, str]) -> str:
    """The sentence about a key that a table does not have.

    Parameters
    ----------
    key : str
        What was written.
    noun : str
        Class of the table, e.g. ``Gear``.
    examples : mapping
        Its keys, each with ``key = example``.
    """
    later = LATER.get(noun, {})
    if key in later:
        return f"{key} is not known yet in this version. {later[key]}"
    for symbol in SYMBOLS.get(key, ()):
        if symbol in examples:
            return f"{key} is not a key here. Write {examples[symbol]} ({key})."
        if symbol in later:
            return f"{key} is not a key here, and {symbol} ({key}) is not known yet in this version. {later[symbol]}"
    shown = key if key.isprintable() and key and len(key) <= 40 else quote(key)
    if meant := meant_key(key, examples):
        return f"{shown} is not a key here. Nearest: {meant}."
    return f"{shown} is not a key here. Keys: {', '.join(known for known in examples if known not in _EVERYWHERE)}."


def meant_key(key: str, known: Iterable[str]) -> str | None:
    """The known key that an unknown one stands for, by symbol or by spelling; None if none is near."""
    keys = list(known)
    symbol = next((each for each in SYMBOLS.get(key, ()) if each in keys), None)
    hint = nearest(key, keys)
    return symbol or (hint[len("Nearest: ") : -1] if hint.startswith("Nearest: ") else None)
