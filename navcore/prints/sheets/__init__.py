"""Plotting sheets on paper and in files: their drawing, their tables, and each medium."""
