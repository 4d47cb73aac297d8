"""What meters that turn have in common: K-factor, range, loss, slip, back pressure, register."""
