"""Claims as tables of a sheet: a reader for each claim kind, which names file, line and key of what is wrong."""
