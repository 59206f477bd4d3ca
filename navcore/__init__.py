"""Navigation without a terminal: lines on the Earth, sailings, the plan, its files and its prints.

Nothing here reads a clock, a network, a locale or the screen, and importing this package costs nothing.
"""
