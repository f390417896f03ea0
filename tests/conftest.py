"""Settings of every test: no property test is a timed test."""

from hypothesis import settings

settings.register_profile("house", deadline=None)
settings.load_profile("house")
