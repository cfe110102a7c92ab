"""Advice: whatever runs the plan more than once.

more.py   how many more of a part fit, how many the line carries, and what stops one more
"""

from lineplanner.advice.more import More, how_many_more

__all__ = ["More", "how_many_more"]
