"""Differential-pressure metering: what every device of the group shares.

* :mod:`device`       what a device is: its equations and how β is cut into steel
* :mod:`response`     Δp from flow, flow from Δp, β from both
* :mod:`sizing`       bore and range, free or given
* :mod:`transmitter`  range series, errors, impulse legs
* :mod:`budget`       contributions to the uncertainty
* :mod:`build`        a family out of a device
"""
