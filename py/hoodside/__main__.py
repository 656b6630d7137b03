"""``python -m hoodside``: the engine on the command line."""

from __future__ import annotations

import sys

from hoodside.cli.main import main

if __name__ == "__main__":
    sys.exit(main())
