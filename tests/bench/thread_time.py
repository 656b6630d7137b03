"""Processor time of a browser's worker threads, from Linux's ``/proc``: steady even on a busy machine."""

from __future__ import annotations

from pathlib import Path

PROC = Path("/proc")
WORKER = "DedicatedWorker"


def worker_ms(profile: Path) -> float | None:
    """Milliseconds used so far by the dedicated workers of the browser that runs on ``profile``.

    None where the system does not tell.
    """
    if not (PROC / "self/schedstat").exists():
        return None
    return sum(_thread_ms(task) for process in _family(profile) for task in process.glob("task/*"))


def _family(profile: Path) -> list[Path]:
    """The browser's processes: those started with the profile, and whatever descends from them."""
    parents = {process.name: _parent(process) for process in PROC.glob("[0-9]*")}
    family = {pid for pid in parents if str(profile) in _text(PROC / pid / "cmdline")}
    while more := {pid for pid, parent in parents.items() if parent in family} - family:
        family |= more
    return [PROC / pid for pid in family]


def _parent(process: Path) -> str:
    after_name = _text(process / "stat").rpartition(")")[2].split()
    return after_name[1] if len(after_name) > 1 else ""


def _thread_ms(task: Path) -> float:
    if not _text(task / "comm").startswith(WORKER):
        return 0.0
    spent = _text(task / "schedstat").split()
    return int(spent[0]) / 1e6 if spent else 0.0


def _text(path: Path) -> str:
    try:
        return path.read_text("utf-8", errors="replace")
    except OSError:  # ended meanwhile
        return ""
