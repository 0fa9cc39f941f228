"""Where a unit meets physics: volumes, times, energies and readings, as bands."""
