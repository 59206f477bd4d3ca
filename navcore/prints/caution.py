"""The caution that stands on every print, in the help and under one key of the workbook. Worded once."""

from __future__ import annotations

CAUTION = (
    "Planning aid only. It holds no official chart, depth, danger, notice, airspace or weather, and it replaces "
    "neither official charts and publications, notices to mariners or airmen, nor the judgement of a licensed "
    "navigator. Lines are geometry: verify every leg, as it will be steered, on the proper official chart. Local "
    "rules and the master or commander decide."
)
