"""What `check` says: parts, cases, what was taken, and the printed text."""
