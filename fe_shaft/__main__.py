"""``python -m fe_shaft`` is ``fe-shaft``."""

from fe_shaft.cli import main

raise SystemExit(main())
