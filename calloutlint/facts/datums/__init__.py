"""What datums do: their kinds, the freedoms they take from the part, the frames and chains they form."""
