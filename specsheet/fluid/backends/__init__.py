"""One module for each kind of fluid; each exports one class that answers :class:`Fluid`."""
