"""The command line: one command for each question a reader has."""
