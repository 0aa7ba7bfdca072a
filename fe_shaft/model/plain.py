"""Plain text of values and addresses in sentences."""

from collections.abc import Iterable, Mapping

from fe_shaft.errors import quote


def as_toml(value: object) -> str:
    """A short value as TOML writes it."""
    if isinstance(value, bool):
        return str(value).lower()
    if isinstance(value, str):
        return f'"{value}"'
    if isinstance(value, list | tuple):
        return f"[{', '.join(as_toml(each) for each in value)}]"
    if isinstance(value, Mapping):
        return f"{{ {', '.join(f'{key} = {as_toml(each)}' for key, each in value.items())} }}"
    return "..." if value is ... else str(value)


def joined(steps: Iterable[str | int]) -> str:
    """Steps of an address, fit to be printed."""
    texts = map(str, steps)
    return ".".join(text if text.isprintable() and len(text) <= 60 else quote(text) for text in texts)
