"""The widgets: they show what they are given, say what was done to them, and own no data."""
