"""The screens: a session with its state and undo, and what a terminal shows of it."""
