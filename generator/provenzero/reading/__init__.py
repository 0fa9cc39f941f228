"""Files that people write to data that knows its lines, and to findings where they are wrong."""
