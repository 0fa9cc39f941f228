"""The commands, what they print, and their exit codes."""
