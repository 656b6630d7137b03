"""Makes the two archives that the browser's Python starts from. Runs inside the Pyodide that will load them.

Sourceless byte code starts several times faster than source: nothing is compiled, checked or looked up
twice. It must come from the very interpreter that will run it, hence inside Pyodide and not beside it.
"""

import csv
import dataclasses
import io
import marshal
import zipfile
from importlib import import_module
from importlib._bootstrap_external import _code_to_hash_pyc
from pathlib import Path
from types import CodeType
from typing import Any

#: Parts of the standard library that an app without terminal, processes, sockets or tests never asks for.
DROPPED = {
    "_pydatetime.py", "_pyio.py", "_pyrepl", "_sysconfigdata__emscripten_wasm32-emscripten.py", "bdb.py",
    "bz2.py", "cProfile.py", "cgi.py", "cmd.py", "compression", "configparser.py", "ctypes", "curses",
    "dbm", "doctest.py", "email", "ensurepip", "ftplib.py", "getpass.py", "http", "idlelib", "imaplib.py",
    "lib2to3", "logging", "lzma.py", "mailbox.py", "mimetypes.py", "modulefinder.py", "multiprocessing",
    "netrc.py", "nntplib.py", "optparse.py", "pdb.py", "pickletools.py", "pip", "plistlib.py", "poplib.py",
    "profile.py", "pstats.py", "pty.py", "pyclbr.py", "pydoc.py", "pydoc_data", "rlcompleter.py",
    "sched.py", "shelve.py", "smtplib.py", "socketserver.py", "sqlite3", "ssl.py", "symtable.py",
    "tabnanny.py", "tarfile.py", "test", "tkinter", "tomllib", "trace.py", "tty.py", "turtle.py",
    "turtledemo", "unittest", "urllib", "uuid.py", "venv", "wave.py", "webbrowser.py", "wsgiref", "xml",
    "xmlrpc", "zipapp.py", "zoneinfo",
}  # fmt: skip

#: Modules that take the place of the library's own; see the note there.
LEAN = Path(__file__).with_name("lean")

#: Encodings an instrument's file can come in, beside those that Python itself needs.
ENCODINGS = {
    "__init__", "aliases", "ascii", "cp1252", "cp437", "cp850", "idna", "latin_1", "mac_roman", "punycode",
    "raw_unicode_escape", "unicode_escape", "utf_16", "utf_16_be", "utf_16_le", "utf_8", "utf_8_sig",
}  # fmt: skip

#: What Python imports before ``sitecustomize`` can make it look into the packed modules.
NOT_PACKED = {
    "_collections_abc.py", "_sitebuiltins.py", "abc.py", "codecs.py", "encodings", "genericpath.py",
    "hoodside_start.py", "io.py", "os.py", "packed_modules.py", "posixpath.py", "site.py", "sitecustomize.py",
    "stat.py",
}  # fmt: skip

_UNCHECKED_HASH = bytes(8)  # never compared: there is no source to compare with
_EPOCH = (1980, 1, 1, 0, 0, 0)  # the same input gives the same archive, byte for byte


def standard_library(source: str, target: str, debug: bool) -> None:
    """Rewrite Pyodide's own ``python_stdlib.zip`` as byte code, less what is never used."""
    with zipfile.ZipFile(source) as stock:
        modules = {name: stock.read(name) for name in sorted(stock.namelist()) if _is_kept(name)}
    modules |= {str(path.relative_to(LEAN)): path.read_bytes() for path in LEAN.rglob("*.py")}
    _write(target, modules, debug)


def engine(source: str, target: str, debug: bool) -> None:
    """Pack ``hoodside``: modules as byte code, facts tables in their compact form."""
    root = Path(source)
    paths = [path for path in sorted(root.rglob("*")) if path.suffix in {".py", ".csv"}]
    files = {str(path.relative_to(root.parent)): path.read_bytes() for path in paths}
    files["hoodside_start.py"] = Path(__file__).with_name("hoodside_start.py").read_bytes()
    files["ready_code.marshal"] = _ready_code(root)
    _write(target, files, debug)


def module_names(root: Path) -> list[str]:
    """Names of the engine's modules that run in the browser, in the sources at ``root``."""
    paths = (path.relative_to(root.parent).with_suffix("") for path in root.rglob("*.py"))
    names = {".".join(path.parts).removesuffix(".__init__") for path in paths}
    return sorted(name for name in names - {"hoodside.__main__"} if not name.endswith("_cpython"))


def _ready_code(root: Path) -> bytes:
    """What ``@dataclass`` compiles when the engine is imported, compiled: text -> marshalled code."""
    codes: dict[str, bytes] = {}

    def run_and_keep(text: str, global_names: dict[str, Any], local_names: dict[str, Any]) -> None:
        code = compile(text, "<dataclass>", "exec", dont_inherit=True)
        codes[text] = marshal.dumps(code)
        exec(code, global_names, local_names)

    dataclasses.exec = run_and_keep  # type: ignore[attr-defined]
    for name in module_names(root):
        import_module(name)
    return marshal.dumps(codes)


def _is_kept(name: str) -> bool:
    top, _, rest = name.partition("/")
    if name.endswith("/") or top in DROPPED:
        return False
    return top != "encodings" or rest.removesuffix(".py") in ENCODINGS


def _write(target: str, sources: dict[str, bytes], debug: bool) -> None:
    # Stored, not deflated: the host sends it gzipped once, and every start then reads it without inflating.
    with zipfile.ZipFile(target, "w", zipfile.ZIP_STORED) as archive:

        def add(name: str, data: bytes) -> None:
            archive.writestr(zipfile.ZipInfo(name, _EPOCH), data)

        packed: dict[str, tuple[str, bool, bytes]] = {}
        for name, data in sources.items():
            if name.endswith(".csv"):
                add(name.removesuffix(".csv") + ".table", _compact_table(data))
            elif not name.endswith(".py") or debug:
                add(name, data)
            elif name.partition("/")[0] in NOT_PACKED:
                add(
                    f"{name}c",
                    bytes(_code_to_hash_pyc(_compiled(name, data), _UNCHECKED_HASH, checked=False)),
                )
            else:
                module = name.removesuffix(".py").replace("/", ".")
                code = marshal.dumps(_compiled(name, data))
                packed[module.removesuffix(".__init__")] = (f"{name}c", module.endswith(".__init__"), code)
        if packed:
            add("packed_modules.marshal", marshal.dumps(packed))


def _compiled(name: str, data: bytes) -> CodeType:
    # Without a docstring, @dataclass works one out from the signature: slow, so the engine keeps its own.
    level = 1 if name.startswith("hoodside/") else 2
    return compile(data, name, "exec", dont_inherit=True, optimize=level)


def _compact_table(data: bytes) -> bytes:
    from hoodside.facts.table import pack_rows

    seen: dict[str, str] = {}  # marshal writes one object once, however often it stands in the table
    rows = csv.DictReader(io.StringIO(data.decode("utf-8")))
    return pack_rows(
        tuple({column: seen.setdefault(cell, cell) for column, cell in row.items()} for row in rows)
    )
