"""What came out: arrays with documented axes, look-up by the engineer's names, comparison, verdicts, words and tables.

Nothing here knows how a model was solved.
"""
