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
        command = commands.add_parser(
            name,
            help=told,
            description=told,
            epilog=_FORMS.get(name),
            formatter_class=argparse.RawDescriptionHelpFormatter,
        )
        add(command)
        command.add_argument("--json", action="store_true", help="answer in JSON, one line per case")
        command.set_defaults(run=run)
    return parser


#: What FILE may hold, shown below the help of a command.
_FORMS = {
    "check": """FILE is a case saved by the app, or an object such as
  {"text": "1H NMR (400 MHz, CDCl3) δ 7.38 (m, 5H), 5.11 (s, 2H), 2.10 (s, 3H). IR (film) 1741 cm-1",
   "formula": "C9H10O2", "candidates": ["CC(=O)OCc1ccccc1", "COC(=O)Cc1ccccc1"], "intended": 0, "rivals": 3}
with the readings as a report under "text", or one by one:
  "solvent": "CDCl3", "mhz": 400, "h1": [{"ppm": 5.11, "mult": "s", "j": [], "n": 2}], "c13": [66.3, 128.5],
  "ir": [1741], "ir_clear": [[3200, 3600]], "ms": [{"mz": 150, "rel": 40}]
An array of cases, or one case a line, is answered case by case.""",
    "spins": """FILE is an object such as
  {"nuclei": [{"ppm": 7.2}, {"ppm": 6.9}], "j": [[0, 1, 8.6]], "mhz": 60}""",
    "amounts": """FILE is an object with its kind (ratio, conversion, yield, purity, solvent), such as
  {"kind": "ratio", "species": [{"name": "ester", "signals": [{"integral": 2.0, "protons": 2}]},
                                {"name": "alcohol", "signals": [{"integral": 0.7, "protons": 2}]}]}""",
}


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
    command.add_argument("--start", default="", metavar="SMILES", help="what the step began from")
    command.add_argument("--with", dest="reagents", default="", metavar="REAGENT", help="what was added")
    command.add_argument("--partner", default="", metavar="SMILES", help="the organic partner")


def _proposals(command: argparse.ArgumentParser) -> None:
    _file(command)
    command.add_argument("--limit", default="", help="how many structures")


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
    ("proposals", "Say what readings suggest by themselves.", "proposals:run", _proposals),
    ("outcomes", "Say what a reaction may have given.", "outcomes:run", _outcomes),
    ("amounts", "Work out ratio, conversion, yield or purity.", "amounts:run", _file),
)
