"""The screens of lineplanner, one per file with its styles beside it."""
