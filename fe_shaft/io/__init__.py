"""Files in and out: model files, tables, fields for viewers."""
