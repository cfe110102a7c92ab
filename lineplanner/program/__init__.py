"""Load, recipe and circuit give stages, current, duration, volts and thickness."""
