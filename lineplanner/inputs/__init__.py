"""Frozen records of what a file or a form describes, and the rules between their fields."""
