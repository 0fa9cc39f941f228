"""The circuit as lines and passages, compiled from the description of a unit."""
