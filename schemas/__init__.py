"""JSON Schemas of every file that is read or written, and example files."""
