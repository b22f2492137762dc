"""The second pass: from the pieces of all lines to the parts of a callout."""
