"""Positions and pressure intervals: what settles, where pressure may come from, where it must leave."""
