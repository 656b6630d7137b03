"""The command line: the engine's methods for scripts and terminals."""
