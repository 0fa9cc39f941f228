"""`python -m provenzero` is the command itself."""

from provenzero.cli.app import app

if __name__ == "__main__":
    app()
