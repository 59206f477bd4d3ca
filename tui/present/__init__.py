"""Values of a plan to styled text: the only place that makes it."""
