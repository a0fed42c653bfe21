"""DejaVu Sans, regular and bold, with its licence."""
