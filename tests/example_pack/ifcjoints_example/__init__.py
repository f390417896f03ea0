"""An example of a check pack: one check, one file."""
