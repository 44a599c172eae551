"""Outlets: flow at a level, one file a kind."""
