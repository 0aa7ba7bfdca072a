"""fe_shaft: how far shafts, gears and bearings move under their loads.

Nouns are classes (`Model`, `Shaft`, `Segment`, `Bearing`, `Pin`, `Gear`, ...), verbs are functions (`read`, `write`,
`solve`, `compare`, `view`, `picture`, `export`). Every dimensional value carries its unit: "25 mm", "1.2 kN*m",
"3 mrad", or a quantity of pint.

Results support, and do not replace, the judgement of a qualified engineer; local codes and licensed practice come
first.
"""

from importlib import import_module
from typing import TYPE_CHECKING, Any

from fe_shaft.version import VERSION

__version__ = VERSION

#: Where each public name lives; loaded when first used, so that `import fe_shaft` costs nothing.
_HOME = {
    **dict.fromkeys(
        (
            "BeltPull",
            "Bearing",
            "Body",
            "Case",
            "Couple",
            "Coupling",
            "Force",
            "Gear",
            "Geometry",
            "Groove",
            "Helix",
            "Housing",
            "Keyway",
            "Limit",
            "Mass",
            "Material",
            "Matrix",
            "Model",
            "Pin",
            "Pulley",
            "Seat",
            "Segment",
            "Shaft",
            "Spline",
            "Sprocket",
            "Stiffness",
        ),
        "fe_shaft.model",
    ),
    **dict.fromkeys(("solve", "compare"), "fe_shaft.analysis.solve"),
    "check": "fe_shaft.analysis.check",
    **dict.fromkeys(("read", "write"), "fe_shaft.io.model_file"),
    "read_contour": "fe_shaft.io.contour.reading",
    "export": "fe_shaft.io.export",
    **dict.fromkeys(("view", "picture"), "fe_shaft.views"),
    **dict.fromkeys(("Comparison",), "fe_shaft.results.comparison"),
    **dict.fromkeys(("Results",), "fe_shaft.results.results"),
    **dict.fromkeys(
        ("FileError", "FreeMotionError", "LoadError", "ModelError", "ShaftError", "SolutionError", "UsageError"),
        "fe_shaft.errors",
    ),
}

__all__ = ["__version__", *sorted(_HOME)]

if TYPE_CHECKING:
    from fe_shaft.analysis.check import check as check
    from fe_shaft.analysis.solve import compare as compare
    from fe_shaft.analysis.solve import solve as solve
    from fe_shaft.errors import FileError as FileError
    from fe_shaft.errors import FreeMotionError as FreeMotionError
    from fe_shaft.errors import LoadError as LoadError
    from fe_shaft.errors import ModelError as ModelError
    from fe_shaft.errors import ShaftError as ShaftError
    from fe_shaft.errors import SolutionError as SolutionError
    from fe_shaft.errors import UsageError as UsageError
    from fe_shaft.io.contour.reading import read_contour as read_contour
    from fe_shaft.io.export import export as export
    from fe_shaft.io.model_file import read as read
    from fe_shaft.io.model_file import write as write
    from fe_shaft.model import *
    from fe_shaft.results.comparison import Comparison as Comparison
    from fe_shaft.results.results import Results as Results
    from fe_shaft.views import picture as picture
    from fe_shaft.views import view as view


def __getattr__(name: str) -> Any:
    if name not in _HOME:
        raise AttributeError(f"module 'fe_shaft' has no attribute {name!r}")
    value = getattr(import_module(_HOME[name]), name)
    globals()[name] = value
    return value


def __dir__() -> list[str]:
    return sorted(__all__)
