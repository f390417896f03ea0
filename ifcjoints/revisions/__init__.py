"""Two audits side by side."""
