"""From IFC to parts: the only folder, with publishing/property_sets.py, that opens IFC."""
