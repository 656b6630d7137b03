"""Makes ``calls`` importable by its own name, as it is inside Pyodide."""

import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).parent))
