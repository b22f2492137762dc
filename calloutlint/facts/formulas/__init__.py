"""What is computed from numbers alone, each formula with its published source."""
