"""Prepare a bridge once, rate it after every reading."""
