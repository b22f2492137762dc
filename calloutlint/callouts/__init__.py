"""From the text of a callout to the model, and back to canonical text."""
