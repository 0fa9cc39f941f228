"""What one failure does to a set of locks: leaking barriers, and the grade of an isolation."""
