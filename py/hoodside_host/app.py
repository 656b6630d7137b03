"""The Flask application: the bundle under ``/``, the host's own answers under ``/api/``."""

from __future__ import annotations

from pathlib import Path

from flask import Flask, Response, abort, jsonify, request, send_file
from werkzeug.security import safe_join

from hoodside import __version__
from hoodside_host.headers import mime_type, security_headers

INDEX = "index.html"


def create_app(dist: Path) -> Flask:
    """A WSGI application serving the built bundle in ``dist``."""
    app = Flask(__name__, static_folder=None)
    root = dist.resolve()

    @app.get("/")
    def index() -> Response:
        return _send(root, INDEX)

    @app.get("/<path:name>")
    def bundle(name: str) -> Response:
        return _send(root, name)

    @app.get("/api/ping")
    def ping() -> Response:
        answer = jsonify(name="hoodside", version=__version__)
        answer.headers["Cache-Control"] = "no-store"
        return answer

    return app


def _send(root: Path, name: str) -> Response:
    found = safe_join(str(root), name)
    if found is None or not Path(found).is_file():
        abort(404)
    path = Path(found)
    packed = path.with_name(path.name + ".gz")
    zipped = packed.is_file() and request.accept_encodings["gzip"] > 0
    response = send_file(packed if zipped else path, mimetype=mime_type(name), conditional=True)
    del response.headers["Content-Disposition"]
    response.headers.update(security_headers(name, _index_text(root)))
    if packed.is_file():
        response.headers["Vary"] = "Accept-Encoding"
    if zipped:
        response.headers["Content-Encoding"] = "gzip"
    return response


def _index_text(root: Path) -> str:
    return (root / INDEX).read_text("utf-8")
