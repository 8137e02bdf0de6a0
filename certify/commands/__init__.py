"""The command line: one module a verb. It parses and prints, and decides nothing about mathematics."""
