"""The bytes of a file: their fingerprint, and how many are borne. Light, for what runs before the first frame."""

LARGEST = 2_000_000  # bytes; a hundred times the largest file of the demo shop


def digest_of(content: bytes) -> str:
    """A fingerprint of a file's bytes."""
    import hashlib

    return hashlib.sha256(content).hexdigest()
