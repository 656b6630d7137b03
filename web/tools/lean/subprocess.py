"""Takes the place of the standard library's subprocess: a browser has no processes."""

PIPE, STDOUT, DEVNULL = -1, -2, -3


class SubprocessError(Exception):
    pass


class CalledProcessError(SubprocessError):
    pass


class TimeoutExpired(SubprocessError):
    pass


def _refuse(*_arguments, **_options):
    raise OSError("There are no processes in a browser.")


Popen = run = call = check_call = check_output = _refuse
