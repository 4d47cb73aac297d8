"""Differential-pressure metering: what the families of the group share.

Devices that throttle the flow (plates, nozzles, Venturi tubes, cones, wedges):

* :mod:`device`       what a device is: its equations and how β is cut into steel
* :mod:`adapters`     published equations in the form that a device wants them
* :mod:`response`     Δp from flow, flow from Δp, β from both
* :mod:`sizing`       bore and range, free or given
* :mod:`budget`       contributions to the uncertainty
* :mod:`build`        a family out of a device
* :mod:`plate`, :mod:`nozzle`, :mod:`body`, :mod:`wet`   what some of them share

Families that only read a differential pressure (Pitot tubes, probes, laminar elements):

* :mod:`plain`        range, signals and legs
* :mod:`insertion`    blockage, drag and budget of a probe

For both: :mod:`transmitter` (range series, errors, impulse legs), :mod:`derivations`,
:mod:`notes`, and :mod:`given` (entries that cannot be).
"""
