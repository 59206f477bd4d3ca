"""Written form to value and back; the only place that rounds. No NumPy."""
