"""The command line: a file for each verb, and the only writer to standard output."""
