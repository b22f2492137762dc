"""Published tables of the trade as CSV, each naming its source, and their look-ups."""
