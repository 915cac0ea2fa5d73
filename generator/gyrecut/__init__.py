"""gyrecut: one YAML profile becomes a printable cyclone dust separator."""

__version__ = "0.1.0"
