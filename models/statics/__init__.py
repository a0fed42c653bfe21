"""Equilibrium, stability and forces of plane pin-jointed trusses."""
