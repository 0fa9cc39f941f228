"""The properties of a plan, each shown anew on the network: verdicts with their evidence."""
