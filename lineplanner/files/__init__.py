"""Sites on disk: TOML read with all problems at once, saved atomically."""
