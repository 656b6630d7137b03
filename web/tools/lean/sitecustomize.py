"""Imported by ``site`` at the very start of Python, before almost everything else."""

from packed_modules import install

install(__spec__.loader.archive)
