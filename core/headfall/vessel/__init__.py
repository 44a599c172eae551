"""Vessels: plan area, volume and level of each shape, one file a shape; ``profile`` says what every vessel answers."""
