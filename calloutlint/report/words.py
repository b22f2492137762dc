"""Counts in words."""


def counted(number: int, noun: str) -> str:
    """`1 callout`, `3 callouts`, `no callouts`."""
    return f"{number or 'no'} {noun}{'' if number == 1 else 's'}"
