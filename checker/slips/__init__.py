"""Slips: mistakes of a known kind, and the search for those that reproduce what the originator stated."""

from checker.slips.search import Diagnosis as Diagnosis
from checker.slips.search import diagnose as diagnose
