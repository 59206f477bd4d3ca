"""Rhumb lines and great circles on any figure, in arrays."""
