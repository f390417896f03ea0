"""Audit the bolted moment joints of a steel building model."""
