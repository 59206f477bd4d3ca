"""Reading and writing text costs no NumPy, and no width tables until a name needs them."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest

import navcore.text

ROOT = Path(navcore.text.__file__).parent
MODULES = [f"navcore.text.{path.stem}" for path in sorted(ROOT.glob("*.py")) if path.stem != "__init__"]


@pytest.mark.parametrize("heavy", ["numpy", "wcwidth", "decimal", "locale"])
def test_no_text_module_imports_what_is_heavy_or_changes_with_the_place(heavy: str) -> None:
    asked = [*MODULES, "navcore.sailings.parts"]
    code = f"import sys; {'; '.join(f'import {name}' for name in asked)}; print({heavy!r} in sys.modules)"
    done = subprocess.run(
        [sys.executable, "-S", "-c", code], cwd=ROOT.parent.parent, capture_output=True, text=True, check=True
    )
    assert done.stdout.strip() == "False"


@pytest.mark.parametrize("module", MODULES)
def test_each_text_module_imports_alone_without_numpy(module: str) -> None:
    code = f"import sys, {module}; print('numpy' in sys.modules)"
    done = subprocess.run(
        [sys.executable, "-c", code], cwd=ROOT.parent.parent, capture_output=True, text=True, check=True
    )
    assert done.stdout.strip() == "False"
