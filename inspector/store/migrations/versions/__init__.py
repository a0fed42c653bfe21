"""One module a version of the tables, oldest first. A released one is never edited."""
