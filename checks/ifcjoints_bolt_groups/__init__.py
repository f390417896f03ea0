"""Elastic and plastic bolt groups under moment out of their plane."""
