"""The screen `bridges`."""
