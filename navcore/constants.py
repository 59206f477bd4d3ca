"""Constants with their sources."""

from __future__ import annotations

METRES_PER_NAUTICAL_MILE = 1852.0
"""International nautical mile, exact. Source: International Extraordinary Hydrographic Conference, Monaco, 1929."""

METRES_PER_STATUTE_MILE = 1609.344
"""International mile of 5280 feet, exact. Source: International yard and pound agreement, 1959."""

SECONDS_PER_HOUR = 3600.0
