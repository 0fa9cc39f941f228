"""Documents and drawings to bytes: HTML, PDF and SVG."""
