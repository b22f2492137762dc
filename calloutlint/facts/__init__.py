"""What is computed from a drawing, and the names under which rules ask for it."""
