"""Wetted parts of an electromagnetic meter: liner, electrodes, earthing."""
