"""The host: serves the app's bundle on this machine or a lab network."""

from hoodside_host.app import create_app

__all__ = ["create_app"]
