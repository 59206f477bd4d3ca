"""The sailings as worked by tables, every step as data."""
