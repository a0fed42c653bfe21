"""How the tables of one version of the program become those of the next, by Alembic."""
