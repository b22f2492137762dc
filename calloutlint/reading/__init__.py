"""Readers: each turns files into drawings."""
