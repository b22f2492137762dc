"""The commands, one a module: each adds its arguments to the parser and says what to run."""
