"""`python -m provenzero` is the command itself."""

from provenzero.cli.app import main

if __name__ == "__main__":
    main()
