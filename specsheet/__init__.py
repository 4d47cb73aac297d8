"""From one tag's process data to a purchase-ready flow-meter specification."""

__version__ = "0.1.0"
