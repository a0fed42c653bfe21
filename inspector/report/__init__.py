"""The PDF rating summary."""
