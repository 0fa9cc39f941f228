"""One module a kind of equipment: which lines it joins in which position."""
