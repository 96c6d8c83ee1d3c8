"""`python -m uq`: the same as the command."""

from uq.cli.main import main

if __name__ == "__main__":
    main()
