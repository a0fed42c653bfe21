"""The JSON Schemas of both formats, as data of the installed program; beside them the documents for people."""
