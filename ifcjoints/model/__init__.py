"""What everything is made of: plain data, no IFC, no files."""
