"""The jobs there are, and the rules of the site."""
