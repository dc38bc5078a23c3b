"""Settings of all tests: property tests draw the same examples in every run and know no deadline.

A run that fails can so be repeated anywhere; a longer search is a matter of one option::

    python -m pytest tests/properties --hypothesis-profile=search
"""

from hypothesis import HealthCheck, settings

settings.register_profile(
    "house", deadline=None, derandomize=True, suppress_health_check=[HealthCheck.too_slow]
)
settings.register_profile(
    "search", deadline=None, max_examples=1000, suppress_health_check=[HealthCheck.too_slow]
)
settings.load_profile("house")
