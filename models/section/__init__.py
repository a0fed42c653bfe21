"""Sections as plates: nominal and remaining properties of every shape."""
