"""Takes the place of the standard library's colour themes: there is no terminal to colour."""


class _Plain(str):
    """Every theme, section and colour in one: the empty text."""

    __slots__ = ()

    def __getattr__(self, name):
        if name.startswith("__"):
            raise AttributeError(name)
        return self


ANSIColors = NoColors = _Plain()


def get_colors(colorize=False, *, file=None):
    return ANSIColors


def get_theme(**_options):
    return ANSIColors


def set_theme(_theme):
    pass


def can_colorize(*, file=None):
    return False


def decolor(text):
    return text
