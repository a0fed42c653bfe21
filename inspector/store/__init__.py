"""The store: structures in tables, an append-only journal, SQLite underneath."""
