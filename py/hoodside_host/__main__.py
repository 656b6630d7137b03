"""``python -m hoodside_host``: serve a built bundle until interrupted."""

from __future__ import annotations

import argparse
import socket
import sys
import webbrowser
from pathlib import Path

from cheroot.wsgi import Server

from hoodside_host import create_app

DEFAULT_PORT = 8017
_DIST = Path(__file__).resolve().parents[2] / "dist"
_LAN_NOTE = """\
On the lab network: http://{address}:{port}
Phones and tablets can use the app from there while they can reach this machine. To keep it for offline use
they need HTTPS, which this version does not bring yet; on this machine itself offline use works."""


def main(arguments: list[str] | None = None) -> int:
    """Serve; 0 after an interrupt, 2 when there is nothing to serve or the port is taken."""
    options = _options(arguments)
    if not (options.dist / "index.html").is_file():
        return _refuse(f"{options.dist} holds no built app. Run `python3 build.py build` first.")
    server = Server(("0.0.0.0" if options.lan else "127.0.0.1", options.port), create_app(options.dist))
    try:
        server.prepare()
    except (OSError, OverflowError) as err:
        return _refuse(f"Port {options.port} cannot be used ({err}). Name another with --port.")
    _greet(options, port=server.bind_addr[1])
    return _serve(server)


def _options(arguments: list[str] | None) -> argparse.Namespace:
    parser = argparse.ArgumentParser(prog="hoodside_host", description="Serve the built app.")
    parser.add_argument("--dist", type=Path, default=_DIST, help="folder of the built app")
    parser.add_argument("--port", type=int, default=DEFAULT_PORT, help="0 takes any free one")
    parser.add_argument("--lan", action="store_true", help="also serve to other machines on the network")
    parser.add_argument("--open", action="store_true", help="open the app in the browser")
    return parser.parse_args(arguments)


def _refuse(message: str) -> int:
    print(message, file=sys.stderr)
    return 2


def _greet(options: argparse.Namespace, port: int) -> None:
    address = f"http://127.0.0.1:{port}"
    print(f"Hoodside is at {address} (stop with Ctrl-C)", flush=True)
    if options.lan:
        print(_LAN_NOTE.format(address=_lan_address(), port=port), flush=True)
    if options.open:
        webbrowser.open(address)


def _serve(server: Server) -> int:
    try:
        server.serve()
    except KeyboardInterrupt:
        print("Stopped.")
    finally:
        server.stop()
    return 0


def _lan_address() -> str:
    """This machine's address on the network, found without sending anything."""
    with socket.socket(socket.AF_INET, socket.SOCK_DGRAM) as probe:
        try:
            probe.connect(("192.0.2.1", 9))  # a documentation address (RFC 5737): only the route is looked up
            return str(probe.getsockname()[0])
        except OSError:
            return socket.gethostname()


if __name__ == "__main__":
    sys.exit(main())
