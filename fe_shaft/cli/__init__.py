"""The command line ``fe-shaft``: each command reads, calls one verb, and writes."""

from fe_shaft.cli.run import main

__all__ = ["main"]
