"""The passage plan: the model, its edits, its solution and its quantities."""
