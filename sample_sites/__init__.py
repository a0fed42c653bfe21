"""Invented footbridges in the site format, each there for a reason that its notes tell; data only."""
