"""The screen `report`."""
