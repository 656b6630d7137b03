"""Commands and their exit codes: 0 done, 2 bad input with one line on stderr, never a traceback."""

from __future__ import annotations

import argparse
import os
import sys
from collections.abc import Callable, Sequence
from importlib import import_module
from typing import NoReturn

import hoodside
from hoodside.engine import error_of
from hoodside.errors import HoodsideError

DONE, FAILED, BAD_INPUT, INTERRUPTED = 0, 1, 2, 130

Run = Callable[[argparse.Namespace], int]


class _Parser(argparse.ArgumentParser):
    """A parser that complains on one line."""

    def error(self, message: str) -> NoReturn:
        self.exit(BAD_INPUT, f"{self.prog}: {message}. See {self.prog} --help.\n")


def main(arguments: Sequence[str] | None = None) -> int:
    """Run one command; the exit code."""
    for stream in (sys.stdout, sys.stderr):
        if hasattr(stream, "reconfigure"):
            stream.reconfigure(errors="replace")
    try:
        options = _parser().parse_args(arguments)
        code = _loaded(options.run)(options)
        sys.stdout.flush()
    except HoodsideError as err:
        return _complain(err.one_line(), BAD_INPUT)
    except BrokenPipeError:
        # Whoever read the output has enough. Python would complain once more when it closes stdout.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return DONE
    except KeyboardInterrupt:
        return INTERRUPTED
    except Exception as err:  # never a traceback at the bench
        told = error_of(err)
        return _complain(f"{told['message']} {told['hint']}", FAILED)
    return code


def _complain(line: str, code: int) -> int:
    print(" ".join(line.split()), file=sys.stderr)
    return code


def _loaded(name: str) -> Run:
    """A command by "module:function": only the one that is run has its modules loaded."""
    module, function = name.split(":")
    found: Run = getattr(import_module(f"hoodside.cli.{module}"), function)
    return found


def _parser() -> argparse.ArgumentParser:
    parser = _Parser(
        prog="python -m hoodside",
        description="Do these readings fit this structure, what else would fit, and what to measure next?",
    )
    parser.add_argument("--version", action="version", version=f"hoodside {hoodside.__version__}")
    commands = parser.add_subparsers(title="commands", metavar="COMMAND", required=True)
    for name, told, run, add in _COMMANDS:
        command = commands.add_parser(name, help=told, description=told)
        add(command)
        command.add_argument("--json", action="store_true", help="answer in JSON, one line per case")
        command.set_defaults(run=run)
    return parser


def _file(command: argparse.ArgumentParser) -> None:
    command.add_argument("file", nargs="?", default="-", metavar="FILE", help="input, or - for stdin")


def _predict(command: argparse.ArgumentParser) -> None:
    command.add_argument("smiles", metavar="SMILES", help="the structure, or - for a CTfile on stdin")
    command.add_argument("--solvent", default="", help="NMR solvent (CDCl3)")
    command.add_argument("--mhz", default="", help="1H frequency in MHz (400)")
    command.add_argument(
        "--explain", action="store_true", help="say how each number came about: base, increments, sources"
    )


def _rivals(command: argparse.ArgumentParser) -> None:
    command.add_argument("smiles", metavar="SMILES", help="the structure")
    command.add_argument("--readings", metavar="FILE", help="readings that rivals should fit")
    command.add_argument("--limit", default="", help="how many rivals")


def _outcomes(command: argparse.ArgumentParser) -> None:
    command.add_argument("smiles", metavar="SMILES", help="the starting structure")
    command.add_argument("--with", dest="reagents", default="", metavar="REAGENT", help="what was added")
    command.add_argument("--partner", default="", metavar="SMILES", help="the organic partner")
    command.add_argument("--type", dest="kind", default="", help="the kind of reaction, in words")


_COMMANDS: tuple[tuple[str, str, str, Callable[[argparse.ArgumentParser], None]], ...] = (
    ("check", "Weigh the readings of a sample against structures.", "check:run", _file),
    ("predict", "Say what a structure should show.", "predict:run", _predict),
    ("parse", "Read report lines as chemists write them.", "parse:run", _file),
    ("spins", "Simulate the spectrum of a spin system.", "spins:run", _file),
    ("rivals", "Put up structures that might fit as well.", "rivals:run", _rivals),
    ("outcomes", "Say what a reaction may have given.", "outcomes:run", _outcomes),
    ("amounts", "Work out ratio, conversion, yield or purity.", "amounts:run", _file),
)
