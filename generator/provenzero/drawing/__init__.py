"""The circuit of a unit as shapes in millimetres: symbols, how they are laid out on sheets, and what is marked on them."""
