"""The first of our own code that the browser's Python runs; packed beside ``hoodside`` by the build.

``@dataclass`` writes its methods as text and compiles them at every start. The build has compiled the same
texts once (``READY``, written beside this module); here they are only looked up.
"""

import dataclasses
import marshal
from importlib.util import find_spec

READY = "ready_code.marshal"

_spec = find_spec(__name__)
_archive = _spec.loader.archive
_ready = marshal.loads(_spec.loader.get_data(f"{_archive}/{READY}"))


def _run(text, global_names, local_names):
    exec(_ready.get(text, text), global_names, local_names)


dataclasses.exec = _run

from hoodside.engine import handle  # noqa: E402, F401
