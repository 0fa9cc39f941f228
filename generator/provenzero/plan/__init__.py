"""From a job on a unit to the steps: zone, dead region, locks, order, verification, impairment, the way back."""
