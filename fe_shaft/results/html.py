"""Printed text for notebooks."""

from __future__ import annotations

from html import escape


def preformatted(text: str) -> str:
    """Text as HTML in a fixed-width face, nothing in it taken for markup."""
    return f'<pre style="line-height: 1.2; white-space: pre; overflow-x: auto">{escape(text)}</pre>'
