"""Pictures of the bent shafts: a window, or a PNG without a display. Knows results, and nothing of how they came."""

from fe_shaft.views.picture import picture
from fe_shaft.views.quantities import COLOURINGS
from fe_shaft.views.window import view

__all__ = ["COLOURINGS", "picture", "view"]
