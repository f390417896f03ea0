"""Data of the trade as small CSV files, each with its source."""
