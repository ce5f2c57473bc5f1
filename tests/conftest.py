"""Settings for all tests: no test fails because a machine is slow."""

from hypothesis import settings

settings.register_profile("patient", deadline=None)
settings.load_profile("patient")
