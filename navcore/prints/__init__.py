"""The leg table and the media it is printed in."""
