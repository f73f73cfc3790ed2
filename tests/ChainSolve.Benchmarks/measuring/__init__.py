"""The parts of measure.py."""
