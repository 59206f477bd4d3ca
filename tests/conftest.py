from __future__ import annotations

import sys
from pathlib import Path

from hypothesis import settings

sys.path.insert(0, str(Path(__file__).parent))

settings.register_profile("house", deadline=None, derandomize=True, print_blob=True)
settings.load_profile("house")
