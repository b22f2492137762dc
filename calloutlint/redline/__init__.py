"""Redlines: the corrected callout, proven by checking again, and written into the sheet on request."""
