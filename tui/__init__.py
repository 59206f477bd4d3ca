"""The terminal side of legbook: the command line and the workbook."""
