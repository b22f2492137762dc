"""What a reader gets: the terminal, and the record for programs."""
