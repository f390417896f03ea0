"""From parts to joints."""
