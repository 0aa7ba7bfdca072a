"""Parts by name, each put together when it is first asked for."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping

import numpy as np
from numpy.typing import NDArray

from fe_shaft.results.movement import Movement

Parts = Mapping[str, Movement[NDArray[np.float64]]]


class PartsFound(Parts):
    """A read-only mapping that calls `find` once a name."""

    def __init__(self, names: tuple[str, ...], find: Callable[[str], Movement[NDArray[np.float64]]]) -> None:
        self._names, self._find = names, find
        self._known: dict[str, Movement[NDArray[np.float64]]] = {}

    def __getitem__(self, name: str) -> Movement[NDArray[np.float64]]:
        if name not in self._known:
            if name not in self._names:
                raise KeyError(name)
            self._known[name] = self._find(name)
        return self._known[name]

    def __contains__(self, name: object) -> bool:
        return name in self._names

    def __iter__(self) -> Iterator[str]:
        return iter(self._names)

    def __len__(self) -> int:
        return len(self._names)
