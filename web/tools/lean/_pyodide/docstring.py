"""Takes the place of Pyodide's module that works out its help texts, one signature at a time."""


def dedent_docstring(docstring):
    return docstring


def get_cmeth_docstring(func):
    return f"{func.__name__}()\n--\n\n"
