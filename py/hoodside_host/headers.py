"""The headers that the offline app depends on, stated here and not left to the machine's own tables."""

from __future__ import annotations

import base64
import hashlib
import re
from pathlib import PurePosixPath

#: Operating systems disagree on these, and browsers refuse a module or stall on a wasm of the wrong type.
#: (Flask adds the charset, UTF-8, to the text types.)
MIME_TYPES = {
    ".css": "text/css",
    ".csv": "text/csv",
    ".html": "text/html",
    ".ico": "image/vnd.microsoft.icon",
    ".js": "text/javascript",
    ".json": "application/json",
    ".mjs": "text/javascript",
    ".png": "image/png",
    ".svg": "image/svg+xml",
    ".txt": "text/plain",
    ".wasm": "application/wasm",
    ".webmanifest": "application/manifest+json",
    ".woff2": "font/woff2",
    ".zip": "application/zip",
}
UNKNOWN_TYPE = "application/octet-stream"

#: The one script that may build code from text: RDKit's bindings do so when they start.
WORKER_SCRIPT = "worker/worker.mjs"

_POLICY = {
    "default-src": "'self'",
    "style-src": "'self'",
    "style-src-attr": "'unsafe-inline'",  # the drawings carry style attributes
    "img-src": "'self' data: blob:",
    "object-src": "'none'",
    "base-uri": "'none'",
    "form-action": "'none'",
    "frame-ancestors": "'none'",
}

_EVERYWHERE = {
    "Cache-Control": "no-cache",  # file names never change, so every use asks whether the content has
    "Cross-Origin-Embedder-Policy": "require-corp",
    "Cross-Origin-Opener-Policy": "same-origin",
    "Referrer-Policy": "no-referrer",
    "X-Content-Type-Options": "nosniff",
}

_INLINE_SCRIPT = re.compile(r"<script(?![^>]*\bsrc=)[^>]*>(.*?)</script>", re.DOTALL | re.IGNORECASE)


def mime_type(name: str) -> str:
    """Content type by the ending of the file name."""
    return MIME_TYPES.get(PurePosixPath(name).suffix.lower(), UNKNOWN_TYPE)


def inline_script_hashes(page: str) -> list[str]:
    """CSP sources for the scripts that stand in a page itself (the import map)."""
    digests = (hashlib.sha256(script.encode()).digest() for script in _INLINE_SCRIPT.findall(page))
    return [f"'sha256-{base64.b64encode(digest).decode()}'" for digest in digests]


def security_headers(name: str, page: str) -> dict[str, str]:
    """Headers for one file of the bundle; inline scripts of ``page``, the text of index.html, may run."""
    allowed = ["'self'", "'wasm-unsafe-eval'"]
    allowed += ["'unsafe-eval'"] if name == WORKER_SCRIPT else inline_script_hashes(page)
    policy = {**_POLICY, "script-src": " ".join(allowed)}
    text = "; ".join(f"{directive} {sources}" for directive, sources in policy.items())
    return {**_EVERYWHERE, "Content-Security-Policy": text}
