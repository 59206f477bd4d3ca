from __future__ import annotations

from hypothesis import settings

settings.register_profile("house", deadline=None, derandomize=True, print_blob=True)
settings.load_profile("house")
