"""The drawing as data: frozen, exact, with its units; knows no file and no grammar."""
