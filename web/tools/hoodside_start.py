"""The first of our own code that the browser's Python runs; packed beside ``hoodside`` by the build.

``@dataclass`` writes its methods as text and compiles them at every start. The build has compiled the same
texts once (``READY``, written beside this module); here they are only looked up.
"""

import dataclasses
import marshal

from packed_modules import install

READY = "ready_code.marshal"

_loader = __spec__.loader
_ready = marshal.loads(_loader.get_data(f"{_loader.archive}/{READY}"))


def _run(text, global_names, local_names):
    ready = _ready.get(text)
    exec(text if ready is None else marshal.loads(ready), global_names, local_names)


dataclasses.exec = _run
install(_loader.archive)

from hoodside.engine import handle  # noqa: E402, F401
