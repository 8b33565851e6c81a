"""A checker of merestone certificates in Python's standard library alone, on integers and fractions.

It was written from docs/certificate-format.md and the lemmas, not from the C++ program, and shares nothing with it.
"""
