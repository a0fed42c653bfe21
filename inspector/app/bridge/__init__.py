"""The screen `bridge`."""
