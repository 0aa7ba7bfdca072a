"""Side by side with general-purpose frame libraries, and against a bare Python start: ratios in one run."""
