"""The rules of EN 1993-1-8:2005 with its corrigenda, one file for each component."""
