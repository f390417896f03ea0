"""`python -m ifcjoints` is the command `ifcjoints`."""

from .cli import main

if __name__ == "__main__":
    main()
