"""The numerics seam of the browser gives the lines that numpy gives."""

from __future__ import annotations

import json
import os
import shutil
import subprocess
from pathlib import Path

import pytest

from bench.spin_timing import timed_system
from hoodside.predict.spins import cluster_lines, exact_lines

ROOT = Path(__file__).parents[2]
SCRIPT = """
import {{ createRequire }} from 'node:module';
import {{ makeNumerics }} from '{root}/web/engine/numerics-bridge.js';
const mlMatrix = createRequire('{root}/web/engine/')('{modules}/ml-matrix');
const {{ loadPyodide }} = await import('{modules}/pyodide/pyodide.mjs');
const python = await loadPyodide({{ indexURL: '{modules}/pyodide/' }});
python.registerJsModule('hoodside_numerics', makeNumerics(mlMatrix));
python.mountNodeFS('/py', '{root}/py');
python.mountNodeFS('/bench', '{root}/tests/bench');
process.stdout.write(python.runPython(`
import sys; sys.dont_write_bytecode = True; sys.path[:0] = ["/py", "/bench"]
import json
from spin_timing import timed_system
from hoodside.predict.spins.exact import exact_lines
from hoodside.predict.spins.clusters import cluster_lines
exact = exact_lines(timed_system("full", 6))
reduced = cluster_lines(timed_system("chain", 9), 36)
json.dumps([[list(lines.hz), list(lines.intensity)] for lines in (exact, reduced)])
`));
"""


@pytest.mark.node
def test_lines_in_pyodide_are_those_of_cpython(tmp_path: Path) -> None:
    node, modules = shutil.which("node"), _modules()
    if node is None or modules is None:
        pytest.skip("needs Node and the npm packages pyodide and ml-matrix: run `npm ci` in web/")
    script = tmp_path / "lines.mjs"
    script.write_text(SCRIPT.format(root=ROOT, modules=modules), "utf-8")
    done = subprocess.run([node, str(script)], capture_output=True, text=True, timeout=300, check=False)
    assert done.returncode == 0, done.stderr[-2000:]
    here = exact_lines(timed_system("full", 6)), cluster_lines(timed_system("chain", 9), 36)
    for (hz, intensity), lines in zip(json.loads(done.stdout), here, strict=True):
        assert hz == pytest.approx(list(lines.hz), abs=1e-6)
        assert intensity == pytest.approx(list(lines.intensity), abs=1e-8)


def _modules() -> Path | None:
    folders = (ROOT / "web" / "node_modules", Path(os.environ.get("HOODSIDE_NODE_MODULES", "/nowhere")))
    return next((f for f in folders if (f / "ml-matrix").is_dir() and (f / "pyodide").is_dir()), None)
