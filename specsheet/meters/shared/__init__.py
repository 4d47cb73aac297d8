"""What meters with a bore of their own have in common: size series, choice, output, response."""
