"""Takes the place of Pyodide's installer: the bundle is complete, nothing is ever installed into it."""

from site import getsitepackages


class _Folder:
    def __init__(self, path):
        self.path = path

    def __str__(self):
        return self.path


SITE_PACKAGES = _Folder(getsitepackages()[0])
DSO_DIR = _Folder("/usr/lib")


def init_loaded_packages():
    pass


def _refuse(*_arguments, **_options):
    raise OSError("Nothing can be installed into this bundle.")


get_install_dir = unpack_buffer = _refuse
