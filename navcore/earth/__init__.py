"""Figures of the Earth, and latitudes and lengths on them."""
