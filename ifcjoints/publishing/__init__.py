"""What a run leaves behind: audit.json, property sets, the report."""
