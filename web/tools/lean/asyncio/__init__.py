"""Takes the place of asyncio's package file: all of asyncio but sockets, pipes, processes and TLS.

Pyodide brings its own event loop, on the browser's; of asyncio it needs tasks, futures and the abstract loop.
"""

from . import events
from .coroutines import *
from .events import *
from .exceptions import *
from .futures import *
from .locks import *
from .protocols import *
from .queues import *
from .runners import *
from .taskgroups import *
from .tasks import *
from .timeouts import *
from .transports import *


class DefaultEventLoopPolicy(events._BaseDefaultEventLoopPolicy):
    """Only a base for Pyodide's own policy."""


_DefaultEventLoopPolicy = DefaultEventLoopPolicy
