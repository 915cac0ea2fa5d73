"""Lets `python -m gyrecut` do what the `gyrecut` command does."""

from gyrecut.cli.main import main

if __name__ == "__main__":
    main()
