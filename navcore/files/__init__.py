"""The plan file, and files written whole."""
