"""Files that others write and read: the site file and the result file."""
