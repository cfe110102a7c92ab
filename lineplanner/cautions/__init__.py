"""When a caution applies, and in which order it is shown. The words are data; the rules are here."""
