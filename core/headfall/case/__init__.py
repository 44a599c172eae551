"""The case a person fills in: its model, its file, and changes to it."""
