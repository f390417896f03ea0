"""Design actions, from a table beside the model."""
